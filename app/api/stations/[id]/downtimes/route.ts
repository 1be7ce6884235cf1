import { write } from '@/lib/http/route'
import { planDowntime } from '@/lib/station/commands/plan-downtime'
import { plannedDowntime, stationAddress } from '@/lib/station/schema'

export const POST = write({
  permission: 'station.write',
  params: stationAddress,
  input: plannedDowntime,
  reason: ({ reason }) => reason,
  handler: ({ db, actor, params, input, now }) => planDowntime(db, actor, params.id, input, now),
})
