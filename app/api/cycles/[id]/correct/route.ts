import { correctHalf } from '@/lib/cycle/commands/correct-half'
import { cycleAddress, halfChange } from '@/lib/cycle/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'cycle.log',
  params: cycleAddress,
  input: halfChange,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => correctHalf(db, actor, params.id, input),
})
