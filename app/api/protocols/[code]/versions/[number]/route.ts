import { write } from '@/lib/http/route'
import { writePlan } from '@/lib/protocol/commands/write-protocol'
import { protocolVersionAddress, writtenPlan } from '@/lib/protocol/schema'

export const PUT = write({
  permission: 'protocol.write',
  params: protocolVersionAddress,
  input: writtenPlan,
  handler: ({ db, actor, params, input }) => writePlan(db, actor, params, input),
})
