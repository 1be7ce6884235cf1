import { pullLabel } from '@/lib/protocol/rules/plan'
import type { PlannedStation } from '@/lib/protocol/schema'
import { addDays, nominalDay, spokenDay } from './calendar'
import { layOut, type LabCalendar, type LaidOut } from './working-days'

export type NominalPull = {
  timeWeeks: number
  label: string
  /** The day that its time point means. The window lies around it, whatever day the pull is planned on. */
  nominalOn: string
  windowFrom: string
  windowTo: string
}
export type PlannedPull = LaidOut<NominalPull>

/** The pulls of one station on the lab's working days: days are dates of its own zone, so no clock change moves them. */
export function pullsOf(
  station: PlannedStation,
  startedOn: string,
  endWeeks: number,
  calendar: LabCalendar,
): PlannedPull[] {
  const pulls = station.timePoints.map((timeWeeks) => ({
    timeWeeks,
    label: pullLabel(station, timeWeeks, endWeeks),
    ...windowOf(startedOn, timeWeeks, station.windowDays),
  }))
  return layOut(pulls, calendar)
}

export function windowOf(startedOn: string, timeWeeks: number, windowDays: number) {
  const nominalOn = nominalDay(startedOn, timeWeeks)
  return {
    nominalOn,
    windowFrom: addDays(nominalOn, -windowDays),
    windowTo: addDays(nominalOn, windowDays),
  }
}

/** Why a pull is not planned on its nominal day, or is although the lab is closed; empty where it is as it should be. */
export function laidWhy({
  nominalOn,
  because,
  isStuck,
}: Pick<PlannedPull, 'nominalOn' | 'because' | 'isStuck'>) {
  if (because === null) return ''
  return isStuck
    ? ` (${because}; no working day lies in its window)`
    : ` instead of ${spokenDay(nominalOn, false)} (${because})`
}

export type DayGroup = Pick<PlannedPull, 'label' | 'nominalOn' | 'dueOn' | 'because' | 'isStuck'> & {
  stations: string[]
}

/** Pulls that are not planned as their time point says, those of several stations on the same days together, by day. */
export function offTheirDay(stations: { name: string; pulls: PlannedPull[] }[]): DayGroup[] {
  const groups = new Map<string, DayGroup>()
  for (const { name, pulls } of stations) {
    for (const { label, nominalOn, dueOn, because, isStuck } of pulls) {
      if (because === null) continue
      const key = [label, nominalOn, dueOn].join()
      const group = groups.get(key) ?? { label, nominalOn, dueOn, because, isStuck, stations: [] }
      group.stations.push(name)
      groups.set(key, group)
    }
  }
  return [...groups.values()].toSorted((a, b) => a.nominalOn.localeCompare(b.nominalOn))
}
