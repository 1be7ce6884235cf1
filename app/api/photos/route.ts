import { read, upload } from '@/lib/http/route'
import { addPhoto, photoTypes } from '@/lib/photo/commands/add-photo'
import { listPhotos } from '@/lib/photo/queries/list'
import { maxCopyBytes, maxPhotoBytes, photoFields, photoFilter } from '@/lib/photo/schema'

export const GET = read({
  permission: 'study.read',
  query: photoFilter,
  handler: ({ db, actor, query }) => listPhotos(db, actor, query.study, query.jar),
})

export const POST = upload({
  permission: 'photo.add',
  maxBytes: maxPhotoBytes,
  types: photoTypes,
  fields: photoFields,
  beside: { field: 'copy', maxBytes: maxCopyBytes, types: ['image/jpeg'] },
  handler: ({ db, actor, file, beside, fields, now }) => addPhoto(db, actor, file, beside, fields, now),
})
