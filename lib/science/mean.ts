import { assertNumbers } from './guard'

/** Arithmetic mean in two passes: the second takes up what the first lost to rounding. */
export function mean(values: readonly number[]): number {
  assertNumbers('values', values, 1)
  const n = values.length
  if (n === 1) return values[0]!
  let sum = 0
  for (let i = 0; i < n; i++) sum += values[i]!
  const first = sum / n
  let rest = 0
  for (let i = 0; i < n; i++) rest += values[i]! - first
  return first + rest / n
}

/** Middle value, or the mean of the two middle ones. */
export function median(values: readonly number[]): number {
  assertNumbers('values', values, 1)
  const sorted = [...values].sort((a, b) => a - b)
  const half = sorted.length >> 1
  const upper = sorted[half]!
  return sorted.length % 2 === 1 ? upper : (sorted[half - 1]! + upper) / 2
}

/** Largest minus smallest, of however many. */
export function rangeOf(values: readonly number[]): number {
  let least = Infinity
  let most = -Infinity
  for (const value of values) {
    if (value < least) least = value
    if (value > most) most = value
  }
  return values.length === 0 ? 0 : most - least
}

/** Sample standard deviation (n − 1), centred before squaring. */
export function sampleStandardDeviation(values: readonly number[]): number {
  assertNumbers('values', values, 2)
  const centre = mean(values)
  let squares = 0
  for (const value of values) squares += (value - centre) ** 2
  return Math.sqrt(squares / (values.length - 1))
}
