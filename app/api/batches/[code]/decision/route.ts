import { decideBatch } from '@/lib/batch/commands/decide-batch'
import { batchAddress, decideInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'batch.write',
  params: batchAddress,
  input: decideInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => decideBatch(db, actor, params.code, input),
})
