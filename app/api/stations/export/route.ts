import { stationSource } from '@/lib/station/queries/stations'
import { stationList } from '@/lib/station/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'station.read',
  query: stationList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: stationList, source: stationSource(db, actor, query), query }),
})
