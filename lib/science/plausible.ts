import { tQuantile } from './distributions'
import { sideBeyond } from './band'
import { isFurther } from './rounding'
import type { Band, Evidence } from './series'
import { fitTrend, trendAt, type TrendPoint } from './trend'

/** A mean of replicates that is looked at before it is believed. */
export type Candidate = { time: number; mean: number; replicates: number; range: number }

const leastForLine = 4

/**
 * Whether a mean lies where the earlier counted points lead. From four times on: outside the line's prediction,
 * half-width max(t₀.₉₉₅ · residual SD, 4 s/√r) · √(1 + leverage); before: more than 7 s/√r from the latest mean.
 */
export function jumpOf(earlier: readonly TrendPoint[], candidate: Candidate, s: number): Evidence | null {
  const ofMean = s / Math.sqrt(candidate.replicates)
  const line = earlier.length >= leastForLine ? fitTrend(earlier, 0) : null
  if (line === null) {
    const latest = earlier[earlier.length - 1]
    if (latest === undefined || s === 0) return null
    return jumpFrom(candidate.mean, latest.mean, 7 * ofMean, 'the latest mean')
  }
  const leverage = 1 / line.n + (candidate.time - line.meanTime) ** 2 / line.sumSquaresTime
  const half = Math.max(tQuantile(0.995, line.n - 2) * line.residualSd, 4 * ofMean) * Math.sqrt(1 + leverage)
  if (half === 0) return null
  return jumpFrom(candidate.mean, trendAt(line, candidate.time), half, 'the trend')
}

function jumpFrom(mean: number, expected: number, allowed: number, from: string): Evidence | null {
  if (!isFurther(Math.abs(mean - expected), allowed, mean)) return null
  return { mean, expected, difference: mean - expected, allowed, from }
}

/**
 * 99 % quantile of the range of n values of a normal distribution, in its SD (studentized range, infinite degrees
 * of freedom); for two rounded to 3.6 as the rule states it.
 */
const rangeFactors = [3.6, 4.12, 4.403, 4.603, 4.757, 4.882, 4.987, 5.078, 5.157] as const

export function rangeFactor(replicates: number): number {
  const last = rangeFactors.length - 1
  return rangeFactors[Math.min(replicates - 2, last)] ?? 0
}

/** Whether replicates lie further apart than their repeatability allows. */
export function spreadOf(candidate: Candidate, s: number): Evidence | null {
  if (candidate.replicates < 2 || s === 0) return null
  const allowed = rangeFactor(candidate.replicates) * s
  return isFurther(candidate.range, allowed, candidate.mean)
    ? { range: candidate.range, allowed, replicates: candidate.replicates }
    : null
}

/** Where a mean lies beyond the band: the edge and the distance. */
export function beyondOf(band: Band, mean: number): Evidence | null {
  const side = sideBeyond(band, mean)
  if (side === null) return null
  const edge = band[side]!
  return { mean, edge, side, by: Math.abs(mean - edge) }
}

/** Largest difference of two means that repeats explain: 2.8 s/√r. Unknown repeatability explains any. */
export function agreementLimit(a: Candidate, b: Candidate, s: number): number {
  if (s === 0) return Infinity
  return 2.8 * s * Math.sqrt((1 / a.replicates + 1 / b.replicates) / 2)
}
