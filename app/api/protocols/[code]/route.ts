import { read } from '@/lib/http/route'
import { getProtocol } from '@/lib/protocol/queries'
import { protocolAddress } from '@/lib/protocol/schema'

export const GET = read({
  permission: 'protocol.read',
  params: protocolAddress,
  handler: ({ db, actor, params }) => getProtocol(db, actor, params.code),
})
