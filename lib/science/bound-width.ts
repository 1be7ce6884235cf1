import { tQuantile } from './distributions'
import { assertComputable, assertFinite, assertNumbers, ScienceError } from './guard'
import { mean } from './mean'
import { assertConfidence } from './regression'

/**
 * How far the one-sided confidence bound of a fitted line's mean lies from the line at `at`, in scatters of one
 * reading: what a plan of times can show before anything is read. Quantile of t with n − 2 df times
 * √(1/n + (at − mean time)² ÷ Σ(time − mean time)²) [std: the bound of ICH Q1E]. Needs three times, two of them apart.
 */
export function boundWidth(times: readonly number[], at: number, confidence = 0.95): number {
  assertNumbers('times', times, 3)
  assertFinite('at', at)
  assertConfidence(confidence)
  const middle = mean(times)
  const sumSquares = times.reduce((sum, time) => sum + (time - middle) ** 2, 0)
  if (sumSquares === 0) throw new ScienceError('times', 'are all the same')
  const leverage = 1 / times.length + (at - middle) ** 2 / sumSquares
  return assertComputable('times', tQuantile(confidence, times.length - 2) * Math.sqrt(leverage))
}

/** By how many percent the bound lies further off where only `kept` of the times are read. */
export function boundWidening(times: readonly number[], kept: readonly number[], at: number): number {
  return assertComputable('kept', 100 * (boundWidth(kept, at) / boundWidth(times, at) - 1))
}
