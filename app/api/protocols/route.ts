import { read, write } from '@/lib/http/route'
import { createProtocol } from '@/lib/protocol/commands/write-protocol'
import { listProtocolPage } from '@/lib/protocol/queries'
import { protocolList } from '@/lib/protocol/rules/list'
import { newProtocol } from '@/lib/protocol/schema'

export const GET = read({
  permission: 'protocol.read',
  query: protocolList.query,
  handler: ({ db, actor, query }) => listProtocolPage(db, actor, query),
})

export const POST = write({
  permission: 'protocol.write',
  input: newProtocol,
  handler: ({ db, actor, input }) => createProtocol(db, actor, input),
})
