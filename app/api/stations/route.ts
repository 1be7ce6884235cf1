import { read, write } from '@/lib/http/route'
import { createStation } from '@/lib/station/commands/keep-station'
import { listStations } from '@/lib/station/queries/stations'
import { newStation } from '@/lib/station/schema'

export const GET = read({
  permission: 'station.read',
  handler: ({ db, actor }) => listStations(db, actor),
})

export const POST = write({
  permission: 'station.write',
  input: newStation,
  handler: ({ db, actor, input }) => createStation(db, actor, input),
})
