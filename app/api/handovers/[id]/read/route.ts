import { markRead } from '@/lib/handover/commands'
import { handoverAddress, readHandover } from '@/lib/handover/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'handover.write',
  params: handoverAddress,
  input: readHandover,
  handler: ({ db, actor, params, input }) => markRead(db, actor, params.id, input.id),
})
