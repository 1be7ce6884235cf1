import { write } from '@/lib/http/route'
import { voidReading } from '@/lib/reading/commands/change'
import { readingAddress, voiding } from '@/lib/reading/schema/change'

export const POST = write({
  permission: 'reading.log',
  params: readingAddress,
  input: voiding,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => voidReading(db, actor, params.id, input),
})
