import { read } from '@/lib/http/route'
import { getCurves } from '@/lib/study/queries/curves'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'study.read',
  params: studyAddress,
  handler: ({ db, actor, params }) => getCurves(db, actor, params.code),
})
