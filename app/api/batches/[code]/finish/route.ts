import { finishMaking } from '@/lib/batch/commands/finish-making'
import { batchAddress, finishMakingInput } from '@/lib/batch/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'batch.write',
  params: batchAddress,
  input: finishMakingInput,
  handler: ({ db, actor, params, input }) => finishMaking(db, actor, params.code, input),
})
