import { weighLine } from '@/lib/batch/commands/weigh-line'
import { batchAddress, weighInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const PUT = write({
  permission: 'batch.write',
  params: batchAddress,
  input: weighInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => weighLine(db, actor, params.code, input),
})
