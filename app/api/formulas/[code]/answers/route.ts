import { answerQuestion } from '@/lib/formula-answer/commands'
import { formulaAnswerInput } from '@/lib/formula-answer/schema'
import { formulaAddress } from '@/lib/formula/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'formula.write',
  params: formulaAddress,
  input: formulaAnswerInput,
  handler: ({ db, actor, params, input }) => answerQuestion(db, actor, params.code, input),
})
