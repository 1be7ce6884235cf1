import { write } from '@/lib/http/route'
import { beginProtocolVersion } from '@/lib/protocol/commands/write-protocol'
import { newProtocolVersion, protocolAddress } from '@/lib/protocol/schema'

export const POST = write({
  permission: 'protocol.write',
  params: protocolAddress,
  input: newProtocolVersion,
  handler: ({ db, actor, params, input }) => beginProtocolVersion(db, actor, params.code, input),
})
