import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { namedJar } from '@/lib/jar/rules'
import { standsAs } from '@/lib/protocol/rules/plan'
import type { Standing } from '@/lib/science/series'
import { fieldsOf, layersOf, worstStanding, type BenchField, type Layers, type Values } from '../rules'
import { jarsToRead, type BenchJarRow } from './jars'
import { getLabDay } from './lab-day'
import { listCurrentSeries, listInitialMeans, listLastReadings } from './values'

export type Bench = Awaited<ReturnType<typeof todaysBench>>
export type BenchStation = Bench['stations'][number]

export type BenchJar = {
  pullJarId: string
  version: number
  jarId: string
  code: string
  /** As the label says it: "45·K7R2M". */
  name: string
  kind: 'watch' | 'measuring' | 'spare' | 'retain'
  asks: 'watch' | 'measuring' | 'repeat'
  state: 'due' | 'resting' | 'done' | 'missed'
  study: { id: string; code: string; title: string }
  batch: { id: string; code: string; formulaName: string; emulsionType: string; isReference: boolean }
  /** What sets it apart from an upright jar in the study's pack: "lying", "own pack: airless pump"; else empty. */
  standsAs: string
  timeWeeks: number
  /** "week 12", "cycle 3". */
  label: string
  dueOn: string
  windowFrom: string
  windowTo: string
  /** The window is over. */
  isOverdue: boolean
  isLastDay: boolean
  shelf: number | null
  place: number | null
  openedBy: { personId: string; name: string; initials: string; at: string } | null
  restUntil: string | null
  /** Rested for the protocol's hours. */
  isReady: boolean
  restHours: number
  closedAt: string | null
  closedBy: { name: string; initials: string } | null
  missedReason: string | null
  standing: Standing
  layers: Layers | null
  fields: BenchField[]
}

/** The technician's day: stations in the order one walks them, with their jars, the most urgent first. */
export async function todaysBench(
  db: Db,
  _actor: Actor,
  { today: asked }: { today?: string | undefined } = {},
) {
  const { zone, now, today: labToday } = await getLabDay(db)
  const today = asked ?? labToday
  const rows = await jarsToRead(db)
    .where('study.state', '=', 'running')
    .where(({ or, and, eb }) =>
      or([
        eb('pj.state', '=', 'resting'),
        and([eb('pj.state', '=', 'due'), eb('pull.dueOn', '<=', today)]),
        eb(sql<string>`(pj.closed_at at time zone ${zone})::date`, '=', today),
      ]),
    )
    .execute()
  const studyIds = [...new Set(rows.map((row) => row.studyId))]
  const values = {
    zone,
    series: await listCurrentSeries(db, studyIds),
    readings: await listLastReadings(db, studyIds, 1),
    initials: await listInitialMeans(db, studyIds),
  }
  const places = await listWalk(db, today)
  const jars = rows.map((row) => ({ stationId: row.stationId, jar: benchJar(row, values, today, now) }))
  const stations = places.map(({ nextOn, nextCount, ...station }) => {
    const here = jars.filter((entry) => entry.stationId === station.id).map((entry) => entry.jar)
    return {
      ...station,
      next: nextOn === null ? null : { dueOn: nextOn, count: nextCount ?? 0 },
      counts: countsOf(here),
      jars: here.toSorted(byUrgency),
    }
  })
  const next = stations.flatMap((station) => (station.next ? [station.next.dueOn] : [])).toSorted()[0] ?? null
  return { today, now, zone, counts: countsOf(jars.map((entry) => entry.jar)), next, stations }
}

/** Stations in walking order, also the empty ones, and when each has something to read next. */
async function listWalk(db: Db, today: string) {
  return db
    .selectFrom('station')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('pull')
          .innerJoin('study', 'study.id', 'pull.studyId')
          .innerJoin('pullJar as pj', 'pj.pullId', 'pull.id')
          .innerJoin('jar', 'jar.id', 'pj.jarId')
          .select('pull.dueOn as nextOn')
          .select(({ fn }) => fn.countAll<number>().as('nextCount'))
          .whereRef('jar.stationId', '=', 'station.id')
          .where('study.state', '=', 'running')
          .where('pj.state', '=', 'due')
          .where('pull.dueOn', '>', today)
          .groupBy('pull.dueOn')
          .orderBy('pull.dueOn')
          .limit(1)
          .as('coming'),
      (join) => join.onTrue(),
    )
    .select([
      'station.id',
      'station.name',
      'station.kind',
      'station.temperatureC',
      'station.cycleLowC',
      'station.cycleHighC',
      'station.walkOrder',
      'station.caution',
      'coming.nextOn',
      'coming.nextCount',
    ])
    .select(
      sql<{
        fromOn: string
        toOn: string
        reason: string
      } | null>`(select jsonb_build_object('fromOn', d.from_on,
          'toOn', d.to_on, 'reason', d.reason) from station_downtime d
        where d.station_id = station.id and d.to_on >= ${today}::date and d.from_on <= ${today}::date + 7
          and not exists (select from station_downtime_cancel c where c.station_downtime_id = d.id)
        order by d.from_on limit 1)`.as('downtime'),
    )
    .where('station.isActive', '=', true)
    .orderBy('station.walkOrder')
    .orderBy('station.name')
    .execute()
}

/** A row of the Bench from its row of the database. */
export function benchJar(row: BenchJarRow, values: Values, today: string, now: string): BenchJar {
  const series = values.series.filter(
    (s) => s.studyId === row.studyId && s.batchId === row.batchId && s.studyStationId === row.studyStationId,
  )
  return {
    pullJarId: row.pullJarId,
    version: row.version,
    jarId: row.jarId,
    code: row.code,
    name: namedJar(row.code, row),
    kind: row.kind as BenchJar['kind'],
    asks: row.asks as BenchJar['asks'],
    state: row.state as BenchJar['state'],
    study: { id: row.studyId, code: row.studyCode, title: row.studyTitle },
    batch: {
      id: row.batchId,
      code: row.batchCode,
      formulaName: row.formulaName,
      emulsionType: row.emulsionType,
      isReference: row.isReference,
    },
    standsAs: standsAs(row.variant, row.plan.ownPack),
    timeWeeks: row.timeWeeks,
    label: row.label,
    dueOn: row.dueOn,
    windowFrom: row.windowFrom,
    windowTo: row.windowTo,
    isOverdue: isToRead(row.state) && row.windowTo < today,
    isLastDay: isToRead(row.state) && row.windowTo === today,
    shelf: row.shelf,
    place: row.place,
    openedBy:
      row.openedBy && isToRead(row.state)
        ? { personId: row.openedBy, name: row.openerName!, initials: row.openerInitials!, at: row.openedAt! }
        : null,
    restUntil: row.restUntil,
    isReady: row.state === 'resting' && row.restUntil !== null && row.restUntil <= now,
    restHours: row.plan.restHours,
    closedAt: row.closedAt,
    closedBy: row.closerName ? { name: row.closerName, initials: row.closerInitials! } : null,
    missedReason: row.missedReason,
    standing: worstStanding(series.map((s) => s.standing)),
    layers: layersOf(values.readings, row),
    fields: fieldsOf(row, values),
  }
}

function isToRead(state: string): boolean {
  return state === 'due' || state === 'resting'
}

function countsOf(jars: BenchJar[]) {
  const count = (state: BenchJar['state']) => jars.filter((jar) => jar.state === state).length
  const [due, resting, done, missed] = [count('due'), count('resting'), count('done'), count('missed')]
  return {
    total: jars.length,
    due,
    resting,
    done,
    missed,
    overdue: jars.filter((jar) => jar.isOverdue).length,
  }
}

const stateOrder = ['due', 'resting', 'done', 'missed']

function byUrgency(a: BenchJar, b: BenchJar): number {
  return (
    stateOrder.indexOf(a.state) - stateOrder.indexOf(b.state) ||
    a.windowTo.localeCompare(b.windowTo) ||
    (a.shelf ?? 0) - (b.shelf ?? 0) ||
    (a.place ?? 0) - (b.place ?? 0) ||
    a.code.localeCompare(b.code)
  )
}
