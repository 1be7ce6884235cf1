import { writeNote } from '@/lib/handover/commands'
import { handoverNote } from '@/lib/handover/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'handover.write',
  input: handoverNote,
  handler: ({ db, actor, input }) => writeNote(db, actor, input),
})
