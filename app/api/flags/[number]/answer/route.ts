import { answerFlag } from '@/lib/flag/commands/answer'
import { flagAddress, flagAnswer } from '@/lib/flag/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'flag.answer',
  params: flagAddress,
  input: flagAnswer,
  reason: (input) => input.why,
  handler: ({ db, actor, params, input }) => answerFlag(db, actor, params.number, input),
})
