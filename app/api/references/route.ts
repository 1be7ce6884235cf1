import { write } from '@/lib/http/route'
import { addReference } from '@/lib/reference/commands'
import { newReference } from '@/lib/reference/schema'

export const POST = write({
  permission: 'batch.write',
  input: newReference,
  handler: ({ db, actor, input }) => addReference(db, actor, input),
})
