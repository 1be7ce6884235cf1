import { closeFlag } from '@/lib/flag/commands/close'
import { flagAddress, flagClosing } from '@/lib/flag/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'flag.close-out',
  params: flagAddress,
  input: flagClosing,
  reason: (input) => input.note,
  handler: ({ db, actor, params, input }) => closeFlag(db, actor, params.number, input),
})
