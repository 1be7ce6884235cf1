import { read } from '@/lib/http/route'
import { getProposal } from '@/lib/photo/queries/proposal'
import { photoAddress } from '@/lib/photo/schema'

export const GET = read({
  permission: 'photo.add',
  params: photoAddress,
  handler: ({ db, actor, params }) => getProposal(db, actor, params.id),
})
