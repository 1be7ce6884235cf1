import { read, write } from '@/lib/http/route'
import { logTemperatures } from '@/lib/station/commands/log-temperatures'
import { stationRecord } from '@/lib/station/queries/record'
import { loggedTemperatures, stationAddress, stationRecordPeriod } from '@/lib/station/schema'

const beginning = '1970-01-01T00:00:00Z'

export const GET = read({
  permission: 'station.read',
  params: stationAddress,
  query: stationRecordPeriod,
  handler: ({ db, params, query, now }) =>
    stationRecord(db, params.id, query.from ?? beginning, query.to ?? now),
})

export const POST = write({
  permission: 'station.log',
  params: stationAddress,
  input: loggedTemperatures,
  handler: ({ db, actor, params, input, now }) => logTemperatures(db, actor, params.id, input, now),
})
