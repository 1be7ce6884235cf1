import { testEmulsionType } from '@/lib/batch/commands/test-type'
import { batchAddress, testTypeInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'batch.write',
  params: batchAddress,
  input: testTypeInput,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => testEmulsionType(db, actor, params.code, input),
})
