import { setAside } from '@/lib/flag/commands/set-aside'
import { flagAddress, flagSettling } from '@/lib/flag/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'flag.answer',
  params: flagAddress,
  input: flagSettling,
  reason: (input) => input.why,
  handler: ({ db, actor, params, input }) => setAside(db, actor, params.number, input),
})
