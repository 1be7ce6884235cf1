import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { recordOf, type StationRecord } from '@/lib/station/rules/record'

/** The temperature log of a period with its mean kinetic temperature and excursions. */
export async function stationRecord(
  db: Db,
  stationId: string,
  from: string,
  to: string,
): Promise<StationRecord & { log: StationLogRow[] }> {
  const station = await db
    .selectFrom('station')
    .select(['kind', 'temperatureC', 'lowC', 'highC'])
    .where('id', '=', stationId)
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  const log = await readLog(db, stationId, from, to)
  return { ...recordOf(station, log), log }
}

async function readLog(db: Db, stationId: string, from: string, to: string) {
  return db
    .selectFrom('stationTemperature')
    .innerJoin('person', 'person.id', 'stationTemperature.recordedBy')
    .select(['stationTemperature.id', 'stationTemperature.measuredAt', 'stationTemperature.temperatureC'])
    .select(['stationTemperature.source', 'person.initials'])
    .where('stationTemperature.stationId', '=', stationId)
    .where('stationTemperature.measuredAt', '>=', from)
    .where('stationTemperature.measuredAt', '<=', to)
    .orderBy('stationTemperature.measuredAt')
    .execute()
}
export type StationLogRow = Awaited<ReturnType<typeof readLog>>[number]
