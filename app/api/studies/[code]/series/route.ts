import { read } from '@/lib/http/route'
import { getSeriesFacts } from '@/lib/series/queries/facts'
import { seriesAddress, studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'study.read',
  params: studyAddress,
  query: seriesAddress,
  handler: ({ db, actor, params, query }) => getSeriesFacts(db, actor, params.code, query),
})
