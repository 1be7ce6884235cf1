import { read, write } from '@/lib/http/route'
import { createStation } from '@/lib/station/commands/keep-station'
import { listStationPage } from '@/lib/station/queries/stations'
import { stationList } from '@/lib/station/rules/list'
import { newStation } from '@/lib/station/schema'

export const GET = read({
  permission: 'station.read',
  query: stationList.query,
  handler: ({ db, actor, query }) => listStationPage(db, actor, query),
})

export const POST = write({
  permission: 'station.write',
  input: newStation,
  handler: ({ db, actor, input }) => createStation(db, actor, input),
})
