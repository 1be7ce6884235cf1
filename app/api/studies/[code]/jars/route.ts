import { read } from '@/lib/http/route'
import { listStudyJars } from '@/lib/study/queries/jars'
import { jarList } from '@/lib/study/rules/jar-list'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'bench.read',
  params: studyAddress,
  query: jarList.query,
  handler: ({ db, actor, params, query }) => listStudyJars(db, actor, params.code, query),
})
