import { addBatchPhoto } from '@/lib/batch/commands/add-photo'
import { batchAddress, batchPhotoFields } from '@/lib/batch/schema'
import { upload } from '@/lib/http/route'
import { photoTypes } from '@/lib/photo/commands/add-photo'
import { maxPhotoBytes } from '@/lib/photo/schema'

export const POST = upload({
  permission: 'batch.write',
  params: batchAddress,
  maxBytes: maxPhotoBytes,
  types: photoTypes,
  fields: batchPhotoFields,
  handler: ({ db, actor, params, file, fields }) => addBatchPhoto(db, actor, params.code, file, fields),
})
