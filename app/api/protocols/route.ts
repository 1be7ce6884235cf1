import { read, write } from '@/lib/http/route'
import { createProtocol } from '@/lib/protocol/commands/write-protocol'
import { listProtocols } from '@/lib/protocol/queries'
import { newProtocol } from '@/lib/protocol/schema'

export const GET = read({
  permission: 'protocol.read',
  handler: ({ db, actor }) => listProtocols(db, actor),
})

export const POST = write({
  permission: 'protocol.write',
  input: newProtocol,
  handler: ({ db, actor, input }) => createProtocol(db, actor, input),
})
