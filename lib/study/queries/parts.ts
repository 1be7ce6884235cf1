import { sql, type RawBuilder } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { Mishap } from '@/lib/jar/rules/mishap'
import type { SeenLayers } from '@/lib/reading/rules/layers-words'
import { meanKineticTemperature } from '@/lib/science/mean-kinetic-temperature'
import { hoursOfEntries } from '@/lib/science/temperature-log'
import type { SeriesFinding, Standing } from '@/lib/science/series'

/** What happened to jars besides being read, in the order in which it happened. */
export function mishapsWhere(condition: RawBuilder<unknown>) {
  return sql<Mishap[]>`(select coalesce(jsonb_agg(jsonb_build_object('kind', m.kind, 'code', its.code,
      'reason', m.reason, 'by', who.initials, 'at', m.happened_at) order by m.happened_at, m.id), '[]')
    from jar_mishap m join jar its on its.id = m.jar_id join person who on who.id = m.recorded_by
    where ${condition})`.as('mishaps')
}

// The parts that the pages of a study share; each is one statement whatever the study's size.

/** Every jar that a pull asks for, with what became of it. */
export async function listStudyPullJars(db: Db, studyId: string) {
  return db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('jar', 'jar.id', 'pullJar.jarId')
    .leftJoin('person as opener', 'opener.id', 'pullJar.openedBy')
    .select([
      'pullJar.id',
      'pullJar.asks',
      'pullJar.state',
      'pullJar.missedReason',
      'pullJar.closedAt',
      'pull.id as pullId',
      'pull.studyStationId',
      'pull.timeWeeks',
      'pull.label',
      'pull.dueOn',
      'pull.windowFrom',
      'pull.windowTo',
      'jar.code',
      'jar.batchId',
      'jar.state as jarState',
      'opener.initials as openedBy',
    ])
    .select(mishapsWhere(sql`m.pull_jar_id = pull_jar.id`))
    .where('pullJar.studyId', '=', studyId)
    .orderBy('pull.timeWeeks')
    .orderBy('pullJar.asks', 'desc')
    .orderBy('jar.code')
    .execute()
}
export type PullJarRow = Awaited<ReturnType<typeof listStudyPullJars>>[number]

export async function listStudySeries(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('series')
    .innerJoin('batch', 'batch.id', 'series.batchId')
    .select([
      'series.batchId',
      'batch.code as batchCode',
      'series.studyStationId',
      'series.attribute',
      'series.used',
      'series.outSinceWeeks',
      'series.leavesAtWeeks',
      'series.latestValue',
      'series.latestWeeks',
    ])
    .select((eb) => [
      eb.ref('series.standing').$castTo<Standing>().as('standing'),
      eb.ref('series.finding').$castTo<SeriesFinding>().as('finding'),
    ])
    .where('series.studyId', '=', studyId)
    .orderBy('series.attribute')
    .execute()
  return rows
}
export type SeriesRow = Awaited<ReturnType<typeof listStudySeries>>[number]

export async function listOpenFlags(db: Db, studyId: string) {
  return db
    .selectFrom('flag')
    .select(['id', 'number', 'batchId', 'studyStationId', 'attribute', 'rule', 'level', 'atWeeks'])
    .select(['sentence', 'state', 'raisedAt'])
    .where('studyId', '=', studyId)
    .where('state', '=', 'open')
    .orderBy('number')
    .execute()
}
export type OpenFlag = Awaited<ReturnType<typeof listOpenFlags>>[number]

export type ReadingDetail = SeenLayers & {
  topMm?: number
  bottomMm?: number
  torquePercent?: number
  spindle?: string
  rpm?: number
  grossG?: number
  creamMm?: number
  isEstimate?: boolean
}

/** What counts: readings that nothing superseded and that are not void. */
export async function listCurrentReadings(db: Db, studyId: string) {
  return db
    .selectFrom('reading')
    .leftJoin('pullJar', 'pullJar.id', 'reading.pullJarId')
    .innerJoin('person', 'person.id', 'reading.recordedBy')
    .select([
      'reading.id',
      'reading.batchId',
      'reading.studyStationId',
      'reading.attribute',
      'reading.replicate',
      'reading.value',
      'reading.measuredAt',
      'pullJar.pullId',
      'reading.pullJarId',
      'person.initials as readBy',
    ])
    .select((eb) => eb.ref('reading.detail').$castTo<ReadingDetail>().as('detail'))
    .where('reading.studyId', '=', studyId)
    .where('reading.isVoid', '=', false)
    .where((eb) =>
      eb.not(
        eb.exists(
          eb
            .selectFrom('reading as newer')
            .select('newer.id')
            .whereRef('newer.supersedesId', '=', 'reading.id'),
        ),
      ),
    )
    .orderBy('reading.measuredAt')
    .orderBy('reading.replicate')
    .execute()
}
export type CurrentReading = Awaited<ReturnType<typeof listCurrentReadings>>[number]

/** Mean temperature that each of the study's stations has had while it has run, wherever its jars stood. */
export async function listStationMeans(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('studyStation')
    .innerJoin('studyStationStay as stay', 'stay.studyStationId', 'studyStation.id')
    .innerJoin('stationTemperature', 'stationTemperature.stationId', 'stay.stationId')
    .select('studyStation.id')
    .select([
      sql<number[]>`jsonb_agg(extract(epoch from station_temperature.measured_at) order by measured_at)`.as(
        'seconds',
      ),
      sql<number[]>`jsonb_agg(station_temperature.temperature_c order by measured_at)`.as('temperaturesC'),
    ])
    .where('studyStation.studyId', '=', studyId)
    .whereRef('stationTemperature.measuredAt', '>=', 'stay.fromAt')
    .where(sql<boolean>`station_temperature.measured_at < coalesce(stay.until_at, 'infinity')`)
    .groupBy('studyStation.id')
    .execute()
  return rows.map(({ id, seconds, temperaturesC }) => ({
    id,
    meanC: meanKineticTemperature(temperaturesC, hoursOfEntries(seconds.map((s) => s / 3600))).meanC,
  }))
}
