import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import type { SeriesPlace } from '@/lib/station/rules/moves'
import type { Leaving } from '@/lib/station/rules/occupancy'

/** A jar takes a place until it is opened, kept elsewhere or lost, and while its study runs. */
export const isStanding = sql<boolean>`(jar.shelf is not null and jar.state in ('stored','pulled','resting')
  and study.state = 'running')`

/** Places that jars take; the caller holds the lock that keeps two starts and moves apart. */
export async function listTakenPlaces(db: Db | Trx, stationIds: string[]) {
  return db
    .selectFrom('jar')
    .innerJoin('study', 'study.id', 'jar.studyId')
    .select(['jar.shelf', 'jar.place'])
    .select(sql<string>`jar.station_id`.as('stationId'))
    .where('jar.stationId', '=', sql<string>`any(${stationIds}::uuid[])`)
    .where(isStanding)
    .execute()
}

/** The pull at which a jar that is opened leaves its place; a watch jar stands to the end. */
const lastPull = sql`(select distinct on (pj.jar_id) pj.jar_id, pull.due_on, pull.label
  from pull_jar pj join pull on pull.id = pj.pull_id
  where pj.state in ('due','resting') order by pj.jar_id, pull.due_on desc)`
const endOn = sql`(study.started_on + round(study.end_weeks * 7)::integer)`

/** Which jars leave which station when, as far as their studies' plans tell. */
export async function listLeavings(db: Db | Trx): Promise<Leaving[]> {
  const { rows } = await sql<Leaving>`
    select jar.station_id as "stationId", study.code as "studyCode", coalesce(p.due_on, ${endOn}) as "leavesOn",
      coalesce(p.label, 'end') as label, count(*)::integer as jars
    from jar join study on study.id = jar.study_id
      left join ${lastPull} p on p.jar_id = jar.id and jar.kind <> 'watch'
    where ${isStanding}
    group by 1, 2, 3, 4 order by 3, 2
  `.execute(db)
  return rows
}

export type StandingJar = {
  id: string
  code: string
  kind: 'watch' | 'measuring' | 'spare' | 'retain'
  state: 'stored' | 'pulled' | 'resting'
  shelf: number
  place: number
  studyId: string
  studyCode: string
  studyTitle: string
  batchCode: string
  studyStationId: string
  leavesOn: string
  leavesAt: string
  /** What its series asks for. */
  position: number
  kindAsked: string
  temperatureC: number | null
  isFreezeThaw: boolean
  variant: string
  cycleLowC: number | null
  cycleHighC: number | null
  humidityPercent: number | null
  light: 'exposed' | 'in foil' | null
}

/** Every jar that stands at a station, shelf by shelf, with what its series asks of the place. */
export async function listStandingJars(
  db: Db | Trx,
  stationId: string,
  jarIds: string[] | null = null,
): Promise<StandingJar[]> {
  const { rows } = await sql<StandingJar>`
    select jar.id, jar.code, jar.kind, jar.state, jar.shelf, jar.place, study.id as "studyId", study.code as "studyCode",
      study.title as "studyTitle", batch.code as "batchCode", ss.id as "studyStationId", ss.position,
      coalesce(p.due_on, ${endOn}) as "leavesOn", coalesce(p.label, 'end') as "leavesAt",
      origin.kind as "kindAsked", ss.temperature_c as "temperatureC", ss.is_freeze_thaw as "isFreezeThaw", ss.variant,
      origin.cycle_low_c as "cycleLowC", origin.cycle_high_c as "cycleHighC",
      origin.humidity_percent as "humidityPercent", study.plan->'stations'->ss.position->>'light' as light
    from jar join study on study.id = jar.study_id
      join batch on batch.id = jar.batch_id
      join study_station ss on ss.id = jar.study_station_id
      join station origin on origin.id = ss.station_id
      left join ${lastPull} p on p.jar_id = jar.id and jar.kind <> 'watch'
    where jar.station_id = ${stationId} and ${isStanding}
      and (${jarIds}::uuid[] is null or jar.id = any(${jarIds}::uuid[]))
    order by jar.shelf, jar.place
  `.execute(db)
  return rows
}

/** How many jars of each series that stands here stand at which station: what a move turns over. */
export async function listSeriesPlaces(db: Db | Trx, stationId: string): Promise<SeriesPlace[]> {
  return db
    .selectFrom('jar')
    .innerJoin('study', 'study.id', 'jar.studyId')
    .select(sql<string>`jar.study_station_id`.as('studyStationId'))
    .select(sql<string>`jar.station_id`.as('stationId'))
    .select((eb) => eb.fn.countAll<number>().as('jars'))
    .where(isStanding)
    .where('jar.studyStationId', 'in', (eb) =>
      eb.selectFrom('jar as here').select('here.studyStationId').where('here.stationId', '=', stationId),
    )
    .groupBy(['jar.studyStationId', 'jar.stationId'])
    .execute()
}
