import type { ProtocolPlan } from '@/lib/protocol/schema'
import { addDays, spokenDay } from './calendar'
import { plannedJars, type TakenBatches } from './jars'
import { pullsOf } from './pulls'
import { counted, numberWord } from './words'
import { mondayOf, whyClosed, type LabCalendar } from './working-days'

export const stationKinds = ['temperature', 'freeze-thaw', 'transport'] as const
export type StationKind = (typeof stationKinds)[number]

/** Jars to measure on one day: how many, at what kind of station, and whether they are opened. */
export type DueJars = { day: string; kind: StationKind; asks: 'watch' | 'measuring'; jars: number }

export type WorkloadWeek = {
  monday: string
  jars: number
  watch: number
  measuring: number
  byKind: Record<StationKind, number>
  /** Days of the week on which nobody is there although the lab works on that weekday. */
  holidays: { day: string; name: string }[]
}
export type Workload = { today: string; late: number; weeks: WorkloadWeek[] }

export const weeksAhead = 26

/**
 * Jars to measure in each week from this one on. What was planned before today and is not read is late, and stands
 * beside the weeks: it is work of this week on top of what this week brings. Jars are counted, never minutes.
 */
export function workloadOf(
  due: DueJars[],
  calendar: LabCalendar,
  today: string,
  count = weeksAhead,
): Workload {
  const first = mondayOf(today)
  const weeks = Array.from({ length: count }, (_, at): WorkloadWeek => {
    const monday = addDays(first, 7 * at)
    return {
      monday,
      jars: 0,
      watch: 0,
      measuring: 0,
      byKind: { temperature: 0, 'freeze-thaw': 0, transport: 0 },
      holidays: holidaysIn(monday, calendar),
    }
  })
  const weekAt = new Map(weeks.map((week) => [week.monday, week]))
  let late = 0
  for (const { day, kind, asks, jars } of due) {
    if (day < today) {
      late += jars
      continue
    }
    const week = weekAt.get(mondayOf(day))
    if (!week) continue
    week.jars += jars
    week[asks] += jars
    week.byKind[kind] += jars
  }
  return { today, late, weeks }
}

function holidaysIn(monday: string, calendar: LabCalendar): { day: string; name: string }[] {
  const sunday = addDays(monday, 6)
  return calendar.holidays.filter(
    ({ day }) => day >= monday && day <= sunday && whyClosed({ ...calendar, holidays: [] }, day) === null,
  )
}

/** What a study that starts on this day will ask of the lab, day by day: of a batch that takes turns only in its own. */
export function dueOfPlan(
  plan: ProtocolPlan,
  { batchIds, referenceIds }: TakenBatches,
  startedOn: string,
  calendar: LabCalendar,
): DueJars[] {
  const days = plan.stations.map(
    (station) =>
      new Map(
        pullsOf(station, startedOn, plan.endWeeks, calendar).map((pull) => [pull.timeWeeks, pull.dueOn]),
      ),
  )
  return plannedJars(plan, batchIds, referenceIds).flatMap(({ position, kind, weeks }) =>
    position === null
      ? []
      : weeks.map((week) => ({
          day: days[position]!.get(week)!,
          kind: plan.stations[position]!.kind,
          asks: kind === 'watch' ? ('watch' as const) : ('measuring' as const),
          jars: 1,
        })),
  )
}

/** The fullest week of those that the study adds to; null where it adds to none of them. */
export function fullestChanged(before: Workload, after: Workload) {
  const changed = after.weeks
    .map((week, at) => ({ monday: week.monday, jars: week.jars, instead: before.weeks[at]!.jars }))
    .filter(({ jars, instead }) => jars !== instead)
  return changed.toSorted((a, b) => b.jars - a.jars || a.monday.localeCompare(b.monday))[0] ?? null
}

/** "week of 2 Mar: 48 jars instead of 21" */
export function changeText({ monday, jars, instead }: { monday: string; jars: number; instead: number }) {
  return `week of ${spokenDay(monday, false)}: ${counted(jars, 'jar')} instead of ${instead === 0 ? 'none' : numberWord(instead)}`
}

export function fullestWeek({ weeks }: Workload): WorkloadWeek | null {
  const fullest = weeks.toSorted((a, b) => b.jars - a.jars)[0]
  return fullest && fullest.jars > 0 ? fullest : null
}
