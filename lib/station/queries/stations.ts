import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { isStanding } from './places'

const columns = [
  'station.id',
  'station.name',
  'station.kind',
  'station.temperatureC',
  'station.lowC',
  'station.highC',
  'station.humidityPercent',
  'station.lightLux',
  'station.lightUvWm2',
  'station.lightHours',
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
        .innerJoin('study', 'study.id', 'jar.studyId')
        .whereRef('jar.stationId', '=', 'station.id')
        .where(isStanding)
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
