import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { recordOf, type StationLimits, type StationRecord } from '@/lib/station/rules/record'

type StationOfRecord = StationLimits & { name: string }

/** The temperature log of a period with its mean kinetic temperature and excursions. */
export async function stationRecord(
  db: Db,
  stationId: string,
  from: string,
  to: string,
): Promise<StationRecord & { station: StationOfRecord; log: StationLogRow[] }> {
  const station = await db
    .selectFrom('station')
    .select(['name', 'kind', 'temperatureC', 'lowC', 'highC'])
    .where('id', '=', stationId)
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  const log = await readLog(db, stationId, from, to)
  return { ...recordOf(station, log), station, log }
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

/** What loggers' files were taken for a station, the newest first. */
export async function listLoggerFiles(db: Db, stationId: string) {
  return db
    .selectFrom('loggerFile as file')
    .innerJoin('person', 'person.id', 'file.recordedBy')
    .select([
      'file.id',
      'file.originalName',
      'file.sha256',
      'file.takenRows',
      'file.knownRows',
      'file.badRows',
    ])
    .select(['file.fromAt', 'file.toAt', 'file.recordedAt', 'person.initials'])
    .where('file.stationId', '=', stationId)
    .orderBy('file.recordedAt', 'desc')
    .limit(20)
    .execute()
}
export type LoggerFileRow = Awaited<ReturnType<typeof listLoggerFiles>>[number]
