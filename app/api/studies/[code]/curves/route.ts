import { read } from '@/lib/http/route'
import { getCurves } from '@/lib/study/queries/curves'
import { curvesQuery, studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'study.read',
  params: studyAddress,
  query: curvesQuery,
  handler: ({ db, actor, params, query }) => getCurves(db, actor, params.code, query.beside),
})
