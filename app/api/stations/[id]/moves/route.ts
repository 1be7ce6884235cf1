import { write } from '@/lib/http/route'
import { moveJars } from '@/lib/station/commands/move-jars'
import { movedJars, stationAddress } from '@/lib/station/schema'

export const POST = write({
  permission: 'jar.move',
  params: stationAddress,
  input: movedJars,
  reason: ({ reason }) => reason,
  handler: ({ db, actor, params, input, now }) => moveJars(db, actor, params.id, input, now),
})
