import { sql, type SqlBool } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
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

type Query = ListQuery<'kind' | 'use'>

/** A lab's stations are few enough for the rows of a page to be picked from all of them. */
export function stationSource(db: Db, actor: Actor, { q, filters }: Query): Source<StationRow> {
  const { kind, use } = filters
  const typed = likeTyped(q)
  return {
    from: sql`station left join lateral (
      select temperature_c, measured_at from station_temperature where station_id = station.id
      order by measured_at desc limit 1) last on true`,
    where: [
      ...(q ? [sql<SqlBool>`(station.name ilike ${typed} or station.caution ilike ${typed})`] : []),
      ...(kind ? [sql<SqlBool>`station.kind = ${kind}`] : []),
      ...(use ? [sql<SqlBool>`station.is_active = ${use === 'in use'}`] : []),
    ],
    id: sql`station.id`,
    idKind: 'uuid',
    sorts: {
      walk: { by: sql`station.walk_order`, kind: 'number' },
      name: naturally('station.name'),
      kind: { by: sql`station.kind`, kind: 'text' },
      temperature: { by: sql`station.temperature_c`, kind: 'number' },
      last: { by: sql`last.temperature_c`, kind: 'number' },
      lastAt: { by: sql`last.measured_at`, kind: 'instant' },
      places: { by: sql`station.shelves * station.places_per_shelf`, kind: 'number' },
    },
    rows: async (ids) => (await listStations(db, actor)).filter((row) => ids.includes(row.id)),
    idOf: (row) => row.id,
  }
}

export async function listStationPage(db: Db, actor: Actor, query: Query) {
  return pageOf(db, stationSource(db, actor, query), query)
}
export type StationsPage = Awaited<ReturnType<typeof listStationPage>>

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
