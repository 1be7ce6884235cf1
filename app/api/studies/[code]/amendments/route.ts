import { write } from '@/lib/http/route'
import { amendStudy } from '@/lib/study/commands/amend-study'
import { amendment, studyAddress } from '@/lib/study/schema'

export const POST = write({
  permission: 'study.write',
  params: studyAddress,
  input: amendment,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input, now }) => amendStudy(db, actor, params.code, input, now),
})
