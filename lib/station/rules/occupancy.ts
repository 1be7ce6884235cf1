import { addDays, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted, listed } from '@/lib/study/rules/words'

/** Jars of a study that leave a station on one day: opened at a pull, or put away when the study ends. */
export type Leaving = { stationId: string; studyCode: string; leavesOn: string; label: string; jars: number }
type Leaves = Pick<Leaving, 'leavesOn' | 'jars'>

/** From this day on so many places are taken. */
export type OccupancyStep = { on: string; taken: number }

/**
 * The places taken from today on. A jar whose day has passed still stands there: nobody knows when it goes, so it is
 * counted to the end.
 */
export function occupancy(today: string, leavings: readonly Leaves[]): OccupancyStep[] {
  const steps: OccupancyStep[] = [{ on: today, taken: leavings.reduce((sum, one) => sum + one.jars, 0) }]
  for (const { leavesOn, jars } of inOrder(today, leavings)) {
    const last = steps.at(-1)!
    const on = freeOn(leavesOn)
    if (last.on === on) last.taken -= jars
    else steps.push({ on, taken: last.taken - jars })
  }
  return steps
}

/** On the day of its pull a jar still stands there when the lab opens. */
export function freeOn(leavesOn: string): string {
  return addDays(leavesOn, 1)
}

/** The first day on which so many places are free; null where no plan frees them. */
export function fitsFrom(
  capacity: number,
  needed: number,
  today: string,
  leavings: readonly Leaves[],
): string | null {
  if (needed > capacity) return null
  return occupancy(today, leavings).find((step) => capacity - step.taken >= needed)?.on ?? null
}

/** "12 places become free by 2 Mar 2026 (S-004's week 8)": the first leavings that would be enough, or all there are. */
export function freedSentence(short: number, today: string, leavings: readonly Leaving[]): string | null {
  const taken: Leaving[] = []
  let freed = 0
  for (const leaving of inOrder(today, leavings)) {
    taken.push(leaving)
    freed += leaving.jars
    if (freed >= short) break
  }
  const last = taken.at(-1)
  if (!last) return null
  const sources = [...new Set(taken.map(({ studyCode, label }) => `${studyCode}’s ${label}`))]
  const told = sources.length > 3 ? [...sources.slice(0, 2), `${sources.length - 2} more`] : sources
  return `${capital(counted(freed, 'place'))} ${freed === 1 ? 'becomes' : 'become'} free by ${spokenDay(last.leavesOn)} (${listed(told)}).`
}

function inOrder<T extends Leaves>(today: string, leavings: readonly T[]): T[] {
  return leavings
    .filter(({ leavesOn }) => leavesOn >= today)
    .toSorted((a, b) => a.leavesOn.localeCompare(b.leavesOn))
}
