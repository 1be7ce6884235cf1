import { read, write } from '@/lib/http/route'
import { movePulls } from '@/lib/pull/commands/move-pulls'
import { listPullsOnClosedDays } from '@/lib/pull/queries/on-closed-days'
import { movedPulls } from '@/lib/pull/schema'

export const GET = read({ permission: 'bench.read', handler: ({ db }) => listPullsOnClosedDays(db) })

export const POST = write({
  permission: 'lab.manage',
  input: movedPulls,
  reason: (input) => input.reason,
  handler: ({ db, actor, input }) => movePulls(db, actor, input),
})
