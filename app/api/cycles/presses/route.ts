import { pressCycle } from '@/lib/cycle/commands/press'
import { cyclePress } from '@/lib/cycle/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'cycle.log',
  input: cyclePress,
  handler: ({ db, actor, input, now }) => pressCycle(db, actor, input, now),
})
