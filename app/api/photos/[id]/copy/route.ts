import { download, upload } from '@/lib/http/route'
import { addCopy } from '@/lib/photo/commands/add-copy'
import { getCopy } from '@/lib/photo/queries/file'
import { maxCopyBytes, photoAddress } from '@/lib/photo/schema'

export const GET = download({
  permission: 'study.read',
  params: photoAddress,
  handler: ({ db, actor, params }) => getCopy(db, actor, params.id),
})

export const POST = upload({
  permission: 'photo.add',
  params: photoAddress,
  maxBytes: maxCopyBytes,
  types: ['image/jpeg'],
  handler: ({ db, actor, params, file }) => addCopy(db, actor, params.id, file),
})
