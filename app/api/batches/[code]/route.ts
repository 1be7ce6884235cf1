import { getBatch } from '@/lib/batch/queries/get-batch'
import { batchAddress } from '@/lib/batch/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'batch.read',
  params: batchAddress,
  handler: ({ db, actor, params }) => getBatch(db, actor, params.code),
})
