import { write } from '@/lib/http/route'
import { correctReading } from '@/lib/reading/commands/change'
import { correction, readingAddress } from '@/lib/reading/schema/change'

export const POST = write({
  permission: 'reading.log',
  params: readingAddress,
  input: correction,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => correctReading(db, actor, params.id, input),
})
