import { monthsOf } from '@/lib/science/months'

/** Weeks on a study's one time ruler, and the days they fall on. No clock: days come from the start. */

const DAY_MS = 86_400_000
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

export type TimeUnit = 'week' | 'month'

/** The day `weeks` after `startOn`, both as YYYY-MM-DD. */
export function dayAfter(startOn: string, weeks: number): string {
  const start = Date.parse(`${startOn}T00:00:00Z`)
  return new Date(start + Math.round(weeks * 7) * DAY_MS).toISOString().slice(0, 10)
}

/** `2 Mar` or, with its year, `2 Mar 2026`. */
export function dayName(day: string, withYear = false): string {
  const [year, month, date] = day.split('-').map(Number)
  const name = `${date} ${MONTHS[(month ?? 1) - 1] ?? ''}`
  return withYear ? `${name} ${year}` : name
}

/** Studies of more than a year are read in months, shorter ones in weeks. */
export function unitOf(endWeeks: number): TimeUnit {
  return endWeeks > 60 ? 'month' : 'week'
}

export function timeLabel(weeks: number, unit: TimeUnit): string {
  return String(Math.round(unit === 'month' ? monthsOf(weeks) : weeks))
}

export type TimeScale = { zero: number; end: number; endWeeks: number; x: (weeks: number) => number }

export function timeScale(zero: number, end: number, endWeeks: number): TimeScale {
  const span = endWeeks > 0 ? endWeeks : 1
  return { zero, end, endWeeks, x: (weeks) => zero + (weeks / span) * (end - zero) }
}

/** Half of today's tag and half of a day's name beside it. */
const TAG_ROOM = 84

/** Half of today's tag with a hair beside it. */
const TAG_HALF = 48

/** The middle of today's tag: over its day, and aside where the tag would run out at either end of the ruler. */
export function tagMiddle(x: number, left: number, width: number): number {
  return Math.max(left + TAG_HALF, Math.min(x, width - TAG_HALF))
}

export type RulerDate = { weeks: number; text: string }

/**
 * Which points get their day written above: the first, the last and as many between as keep `apart`
 * pixels from each other and from today's tag. The year stands where it changes.
 */
export function rulerDates(
  points: number[],
  startOn: string,
  scale: TimeScale,
  tagX: number | null,
  apart = 110,
): RulerDate[] {
  const isClear = (weeks: number, others: number[]) =>
    others.every((other) => Math.abs(scale.x(weeks) - scale.x(other)) >= apart) &&
    (tagX === null || Math.abs(scale.x(weeks) - tagX) >= TAG_ROOM)
  const kept: number[] = []
  const [first, last] = [points[0], points.at(-1)]
  for (const weeks of [last, first, ...points.slice(1, -1)])
    if (weeks !== undefined && isClear(weeks, kept)) kept.push(weeks)
  kept.sort((a, b) => a - b)
  let year = startOn.slice(0, 4)
  return kept.map((weeks) => {
    const day = dayAfter(startOn, weeks)
    const isNewYear = day.slice(0, 4) !== year
    year = day.slice(0, 4)
    return { weeks, text: dayName(day, isNewYear) }
  })
}

/** The points whose number is written: every point that keeps `apart` pixels from the one before. */
export function rulerNumbers(points: number[], scale: TimeScale, tagX: number | null, apart = 26): number[] {
  const kept: number[] = []
  for (const weeks of points) {
    const before = kept.at(-1)
    if (before !== undefined && scale.x(weeks) - scale.x(before) < apart) continue
    if (tagX !== null && Math.abs(scale.x(weeks) - tagX) < TAG_ROOM - 26) continue
    kept.push(weeks)
  }
  return kept
}
