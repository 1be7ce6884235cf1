import { correctHalf } from '@/lib/cycle/commands/correct-half'
import { cycleAddress, halfInstead } from '@/lib/cycle/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'cycle.log',
  params: cycleAddress,
  input: halfInstead,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => correctHalf(db, actor, params.id, input),
})
