import { write } from '@/lib/http/route'
import { cancelDowntime } from '@/lib/station/commands/plan-downtime'
import { cancelledDowntime, downtimeAddress } from '@/lib/station/schema'

export const POST = write({
  permission: 'station.write',
  params: downtimeAddress,
  input: cancelledDowntime,
  reason: ({ reason }) => reason,
  handler: ({ db, actor, params, input, now }) => cancelDowntime(db, actor, params, input, now),
})
