import { download } from '@/lib/http/route'
import { getOriginal } from '@/lib/photo/queries/file'
import { photoAddress } from '@/lib/photo/schema'

export const GET = download({
  permission: 'study.read',
  params: photoAddress,
  handler: ({ db, actor, params }) => getOriginal(db, actor, params.id),
})
