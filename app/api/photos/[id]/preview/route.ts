import { download } from '@/lib/http/route'
import { getPreview } from '@/lib/photo/queries/file'
import { photoAddress } from '@/lib/photo/schema'

export const GET = download({
  permission: 'study.read',
  params: photoAddress,
  handler: ({ db, actor, params }) => getPreview(db, actor, params.id),
})
