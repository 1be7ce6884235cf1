import { download } from '@/lib/http/route'
import { getOutsideDocument } from '@/lib/outside/queries'
import { outsideAddress } from '@/lib/outside/schema'

export const GET = download({
  permission: 'reading.read',
  params: outsideAddress,
  handler: ({ db, actor, params }) => getOutsideDocument(db, actor, params.id),
})
