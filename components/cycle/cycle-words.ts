import type { CyclePlace } from '@/lib/cycle/queries/board'
import { cycleState, type CycleState, type Running } from '@/lib/cycle/rules/state'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

export function stateOf(place: CyclePlace, now: string): CycleState {
  return cycleState({ ...place, asked: place.asked ?? undefined }, now)
}

export function hoursText(hours: number): string {
  return hours < 1 ? `${Math.max(0, Math.round(hours * 60))} min` : `${hours.toFixed(1)} h`
}

/** "16:00", and the day where it is another than today. */
export function whenText(instant: string, now: string, zone: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone: zone, timeStyle: 'short' }).format(
    new Date(instant),
  )
  const day = dayIn(zone, instant)
  return day === dayIn(zone, now) ? time : `${spokenDay(day)}, ${time}`
}

/** What runs, in a sentence; hours elapsed and left against those the protocol prescribes. */
export function runningText(state: Running, now: string, zone: string): string {
  const elapsed = `${hoursText(state.hours)}${state.askedHours === null ? '' : ` of ${state.askedHours} h`}`
  if (state.hold)
    return `${elapsed}, held since ${whenText(state.hold.since, now, zone)}: ${state.hold.reason}.`
  if (state.dueAt === null) return `${elapsed}; the protocol prescribes none.`
  if (state.isOverdue) {
    const late = (Date.parse(now) - Date.parse(state.dueAt)) / 3_600_000
    return `${elapsed}, over since ${whenText(state.dueAt, now, zone)}: ${hoursText(late)} too long.`
  }
  if (state.isDue) return `${elapsed}: end it now.`
  return `${elapsed}, ${hoursText(state.leftHours ?? 0)} left, until ${whenText(state.dueAt, now, zone)}.`
}
