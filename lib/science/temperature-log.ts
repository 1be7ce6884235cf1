import { assertFinite, assertSameLength, ScienceError } from './guard'

/** Limits of a station in °C; null where that side is open. */
export type TemperatureLimits = { lowC: number | null; highC: number | null }

/** A stretch of a log outside the limits on one side; `from` and `to` count the log's entries from 0. */
export type ExcursionSpan = {
  from: number
  /** The first entry that was no longer outside on that side; the last outside where the log ends so. */
  to: number
  side: 'above' | 'below'
  extremeC: number
  hours: number
}

export function sideOf({ lowC, highC }: TemperatureLimits, temperatureC: number): 'above' | 'below' | null {
  if (highC !== null && temperatureC > highC) return 'above'
  if (lowC !== null && temperatureC < lowC) return 'below'
  return null
}

/**
 * Hours that each entry of a log stands for: half the gap to its neighbours on either side, the trapezoidal rule.
 * Times in hours, rising. Entries of one instant share it and stand for next to nothing; undefined where the log
 * spans no time, so that every entry weighs the same.
 */
export function hoursOfEntries(times: readonly number[]): number[] | undefined {
  times.forEach((time, i) => assertFinite(`times[${i}]`, time))
  if (times.length === 0 || times.at(-1)! === times[0]!) return undefined
  return times.map((time, i) => {
    const before = times[i - 1] ?? time
    const after = times[i + 1] ?? time
    if (after < before) throw new ScienceError(`times[${i}]`, 'comes before the entry above it')
    return Math.max((after - before) / 2, 1e-6)
  })
}

/**
 * The stretches of a log outside its limits. Each begins with its first entry outside and ended at the latest when
 * the first entry inside was taken; from one side to the other is two. It is never excused by a mean [practice].
 */
export function excursionSpans(
  times: readonly number[],
  temperaturesC: readonly number[],
  limits: TemperatureLimits,
): ExcursionSpan[] {
  assertSameLength('times', times, 'temperaturesC', temperaturesC)
  const found: ExcursionSpan[] = []
  let open: ExcursionSpan | null = null
  temperaturesC.forEach((temperatureC, i) => {
    const side = sideOf(limits, temperatureC)
    if (open && open.side === side) {
      open.extremeC = (side === 'above' ? Math.max : Math.min)(open.extremeC, temperatureC)
    }
    if (open) Object.assign(open, { to: i, hours: times[i]! - times[open.from]! })
    if (open && open.side !== side) open = null
    if (side === null || open) return
    open = { from: i, to: i, side, extremeC: temperatureC, hours: 0 }
    found.push(open)
  })
  return found
}
