import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { recordOf, type StationRecord } from '@/lib/station/rules'

const columns = [
  'station.id',
  'station.name',
  'station.kind',
  'station.temperatureC',
  'station.lowC',
  'station.highC',
  'station.humidityPercent',
  'station.cycleLowC',
  'station.cycleHighC',
  'station.walkOrder',
  'station.shelves',
  'station.placesPerShelf',
  'station.caution',
  'station.isActive',
  'station.version',
] as const

/** Stations in the order of the walk, with the places taken and the temperature read last. */
export async function listStations(db: Db, _actor: Actor) {
  return db
    .selectFrom('station')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('stationTemperature')
          .select(['stationTemperature.temperatureC as lastC', 'stationTemperature.measuredAt as lastAt'])
          .whereRef('stationTemperature.stationId', '=', 'station.id')
          .orderBy('stationTemperature.measuredAt', 'desc')
          .limit(1)
          .as('last'),
      (join) => join.onTrue(),
    )
    .select(columns)
    .select(['last.lastC', 'last.lastAt'])
    .select((eb) =>
      eb
        .selectFrom('jar')
        .innerJoin('studyStation', 'studyStation.id', 'jar.studyStationId')
        .whereRef('studyStation.stationId', '=', 'station.id')
        .where('jar.state', 'in', ['stored', 'pulled', 'resting'])
        .where('jar.shelf', 'is not', null)
        .select((count) => count.fn.countAll<number>().as('taken'))
        .as('takenPlaces'),
    )
    .orderBy('station.walkOrder')
    .orderBy('station.name')
    .execute()
    .then((rows) => rows.map((row) => ({ ...row, takenPlaces: row.takenPlaces ?? 0 })))
}
export type StationRow = Awaited<ReturnType<typeof listStations>>[number]

export async function getStation(db: Db, _actor: Actor, id: string) {
  const station = await db.selectFrom('station').select(columns).where('id', '=', id).executeTakeFirst()
  if (!station) throw refuse.notFound()
  const studies = await db
    .selectFrom('studyStation')
    .innerJoin('study', 'study.id', 'studyStation.studyId')
    .select(['study.code', 'study.title', 'study.state', 'studyStation.voice'])
    .where('studyStation.stationId', '=', id)
    .orderBy('study.code', 'desc')
    .execute()
  return { ...station, studies }
}
export type StationPage = Awaited<ReturnType<typeof getStation>>

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

/** Free and taken places for an allocation; the caller holds the lock that keeps two starts apart. */
export async function listTakenPlaces(db: Db, stationIds: string[]) {
  return db
    .selectFrom('jar')
    .innerJoin('studyStation', 'studyStation.id', 'jar.studyStationId')
    .select(['studyStation.stationId', 'jar.shelf', 'jar.place'])
    .where('studyStation.stationId', '=', sql<string>`any(${stationIds}::uuid[])`)
    .where('jar.state', 'in', ['stored', 'pulled', 'resting'])
    .where('jar.shelf', 'is not', null)
    .execute()
}
