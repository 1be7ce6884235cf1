import { createBatch } from '@/lib/batch/commands/create-batch'
import { listBatches } from '@/lib/batch/queries/list-batches'
import { batchList } from '@/lib/batch/rules/list'
import { createBatchInput } from '@/lib/batch/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'batch.read',
  query: batchList.query,
  handler: ({ db, actor, query }) => listBatches(db, actor, query),
})

export const POST = write({
  permission: 'batch.write',
  input: createBatchInput,
  handler: ({ db, actor, input }) => createBatch(db, actor, input),
})
