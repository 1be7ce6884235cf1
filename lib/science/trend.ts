import { tQuantile, tUpperTail } from './distributions'
import { boundAt, boundMeets, type BoundedLine } from './meeting'
import { centredSums, residualSquares } from './regression'
import type { Band, SeriesFinding, Trend } from './series'

/** A mean and the number of replicates behind it, at a time in weeks. */
export type TrendPoint = { time: number; mean: number; replicates: number }

export type TrendFit = Trend & {
  /** Without the floor. */
  residualSd: number
}

/**
 * Least-squares line through the counted means, with a residual SD that is never below the repeatability of the
 * means (`floorFactor` × s/√r; unequal r enter by their mean 1/r). null under three points or without spread in time.
 */
export function fitTrend(
  points: readonly TrendPoint[],
  repeatabilitySd: number,
  floorFactor = 1,
): TrendFit | null {
  const n = points.length
  if (n < 3) return null
  const times = new Array<number>(n)
  const means = new Array<number>(n)
  let inverseReplicates = 0
  for (let i = 0; i < n; i++) {
    const point = points[i]!
    times[i] = point.time
    means[i] = point.mean
    inverseReplicates += 1 / point.replicates
  }
  const { meanX, meanY, xx, xy } = centredSums(times, means)
  if (!(xx > 0)) return null

  const slope = xy / xx
  const residualSd = Math.sqrt(residualSquares(times, means, meanX, meanY, slope) / (n - 2))
  const floor = floorFactor * repeatabilitySd * Math.sqrt(inverseReplicates / n)
  const sd = Math.max(residualSd, floor)
  return {
    n,
    slope,
    intercept: meanY - slope * meanX,
    meanTime: meanX,
    meanValue: meanY,
    sumSquaresTime: xx,
    sd,
    residualSd,
  }
}

/** One-sided p of the slope, in its own direction. Points exactly on a line leave nothing to chance, level ones everything. */
export function slopePOf({ n, slope, sumSquaresTime, sd }: Trend): number {
  const scaledSlope = Math.abs(slope) * Math.sqrt(sumSquaresTime)
  if (sd === 0) return scaledSlope === 0 ? 0.5 : 0
  return tUpperTail(scaledSlope / sd, n - 2)
}

export function trendAt(trend: Trend, time: number): number {
  return trend.meanValue + trend.slope * (time - trend.meanTime)
}

export type TrendBandPoint = { time: number; mean: number; low: number; high: number }

/** The trend and its 95 % two-sided confidence band at the given times, for drawing; empty where there is none. */
export function trendBand(finding: Pick<SeriesFinding, 'trend'>, times: readonly number[]): TrendBandPoint[] {
  const trend = finding.trend
  if (trend === null) return []
  const line = boundedLine(trend)
  return times.map((time) => ({
    time,
    mean: trendAt(trend, time),
    low: boundAt(line, -1, time),
    high: boundAt(line, 1, time),
  }))
}

export type Leaving = { leavesAt: number | null; leavesAtLow: number | null; leavesAtHigh: number | null }

/** Beyond this many times the study's length a crossing says nothing and is left out. */
const furthest = 10

/**
 * When the trend meets the edge it moves to, and when the bounds of its 95 % confidence band do: the earliest and
 * the latest time. A bound that never does, or only far beyond the study, gives null.
 */
export function leavingTimes(trend: Trend | null, band: Band, from: number, endTime: number): Leaving {
  const nowhere = { leavesAt: null, leavesAtLow: null, leavesAtHigh: null }
  if (trend === null || trend.slope === 0) return nowhere
  const edge = trend.slope > 0 ? band.upper : band.lower
  if (edge === null) return nowhere
  const direction = trend.slope > 0 ? 1 : -1
  const until = Math.max(from, 0) + furthest * Math.max(endTime, 1)
  const line = boundedLine(trend)
  const meets = (width: number, sign: 1 | -1) => {
    const bounded = { ...line, width }
    const isOutside = direction * (boundAt(bounded, sign, from) - edge) >= 0
    const time = isOutside ? from : boundMeets(bounded, sign, edge, from)
    return time === null || time > until ? null : time
  }
  return {
    leavesAt: meets(0, 1),
    leavesAtLow: meets(line.width, direction),
    leavesAtHigh: meets(line.width, direction === 1 ? -1 : 1),
  }
}

function boundedLine(trend: Trend): BoundedLine {
  return {
    centreX: trend.meanTime,
    centre: trend.meanValue,
    slope: trend.slope,
    n: trend.n,
    sumSquaresX: trend.sumSquaresTime,
    width: tQuantile(0.975, trend.n - 2) * trend.sd,
  }
}
