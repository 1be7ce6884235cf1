import { write } from '@/lib/http/route'
import { changeStudy } from '@/lib/study/commands/change-study'
import { changedStudy, studyAddress } from '@/lib/study/schema'

export const PUT = write({
  permission: 'study.write',
  params: studyAddress,
  input: changedStudy,
  handler: ({ db, actor, params, input }) => changeStudy(db, actor, params.code, input),
})
