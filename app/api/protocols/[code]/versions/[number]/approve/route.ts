import { write } from '@/lib/http/route'
import { approveVersion } from '@/lib/protocol/commands/approve-version'
import { approvedVersion, protocolVersionAddress } from '@/lib/protocol/schema'

export const POST = write({
  permission: 'protocol.approve',
  params: protocolVersionAddress,
  input: approvedVersion,
  handler: ({ db, actor, params, input, now }) => approveVersion(db, actor, params, input, now),
})
