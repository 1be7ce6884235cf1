import type { CyclePlace } from '@/lib/cycle/queries/board'
import { cycleState, type CycleState, type Running } from '@/lib/cycle/rules/state'
import { hoursText, whenText } from '@/lib/cycle/rules/half-words'

export function stateOf(place: CyclePlace, now: string): CycleState {
  return cycleState({ ...place, asked: place.asked ?? undefined }, now)
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
