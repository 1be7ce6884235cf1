import { correctBegin } from '@/lib/cycle/commands/correct-begin'
import { beginChange, cycleAddress } from '@/lib/cycle/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'cycle.log',
  params: cycleAddress,
  input: beginChange,
  reason: (input) => input.reason,
  handler: ({ db, actor, params, input }) => correctBegin(db, actor, params.id, input),
})
