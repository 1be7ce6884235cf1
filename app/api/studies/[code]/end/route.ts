import { write } from '@/lib/http/route'
import { endStudy } from '@/lib/study/commands/change-study'
import { endedStudy, studyAddress } from '@/lib/study/schema'

export const POST = write({
  permission: 'study.write',
  params: studyAddress,
  input: endedStudy,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input, now }) => endStudy(db, actor, params.code, input, now),
})
