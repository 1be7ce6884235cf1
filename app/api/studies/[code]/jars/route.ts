import { read } from '@/lib/http/route'
import { getStudyJars } from '@/lib/study/queries/jars'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'bench.read',
  params: studyAddress,
  handler: ({ db, actor, params }) => getStudyJars(db, actor, params.code),
})
