import { read, write } from '@/lib/http/route'
import { changeStation } from '@/lib/station/commands/keep-station'
import { getStation } from '@/lib/station/queries/stations'
import { changedStation, stationAddress } from '@/lib/station/schema'

export const GET = read({
  permission: 'station.read',
  params: stationAddress,
  handler: ({ db, actor, params }) => getStation(db, actor, params.id),
})

export const PUT = write({
  permission: 'station.write',
  params: stationAddress,
  input: changedStation,
  handler: ({ db, actor, params, input }) => changeStation(db, actor, params.id, input),
})
