import { readBatch } from '@/lib/batch/commands/read-batch'
import { batchAddress, batchReadingInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'batch.write',
  params: batchAddress,
  input: batchReadingInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => readBatch(db, actor, params.code, input),
})
