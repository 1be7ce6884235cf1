import { doStep } from '@/lib/batch/commands/do-step'
import { batchAddress, doStepInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const PUT = write({
  permission: 'batch.write',
  params: batchAddress,
  input: doStepInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => doStep(db, actor, params.code, input),
})
