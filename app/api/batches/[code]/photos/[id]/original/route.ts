import { getBatchOriginal } from '@/lib/batch/queries/photo'
import { batchPhotoAddress } from '@/lib/batch/schema'
import { download } from '@/lib/http/route'

export const GET = download({
  permission: 'batch.read',
  params: batchPhotoAddress,
  handler: ({ db, actor, params }) => getBatchOriginal(db, actor, params),
})
