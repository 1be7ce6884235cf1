import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listHandoverNotes } from '@/lib/handover/queries'
import { benchJar, type BenchJar } from './bench-jar'
import { jarsToRead } from './jars'
import { getLabDay } from './lab-day'
import { listCurrentSeries, listInitialMeans, listLastReadings } from './values'
import { listWalk } from './walk-stations'
import { listWeekLoad } from './week-load'

export type Bench = Awaited<ReturnType<typeof todaysBench>>
export type BenchStation = Bench['stations'][number]

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
        // Pulled early, and not yet read.
        sql<boolean>`(pj.state = 'due' and exists (select from jar_mishap m
          where m.pull_jar_id = pj.id and m.kind = 'pulled early'))`,
        and([
          eb(sql<string>`(pj.closed_at at time zone ${zone})::date`, '=', today),
          // Later pulls that a broken jar took with it are not of today.
          or([eb('pj.state', '<>', 'missed'), eb('pull.dueOn', '<=', today)]),
        ]),
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
  const week = await listWeekLoad(db, today)
  const notes = await listHandoverNotes(db, today, zone)
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
  return { today, now, zone, counts: countsOf(jars.map((entry) => entry.jar)), next, week, notes, stations }
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
