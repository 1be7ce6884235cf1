import { bandUsed } from './band'
import { reaches } from './rounding'
import type { Band, ColdestStation, Evidence } from './series'
import { fitTrend, slopePOf, trendAt, type TrendFit, type TrendPoint } from './trend'

export type LeanFrame = {
  band: Band
  initial: number
  initialTime: number
  endTime: number
  repeatabilitySd: number
  coldest?: ColdestStation | undefined
}

/** Counted points in time order, the initial first. */
export type LeanPoints = readonly (TrendPoint & { day: string | null; isInitial: boolean })[]

export type Lean = { trend: TrendFit; evidence: Evidence }

const leastTimes = 5
const leastSharedDays = 4
/** Half a day in weeks: pulls of one day at two stations. */
const sameDay = 0.5 / 7

/**
 * Whether a series leans: a significant slope over at least five times whose fitted value has used half of the band
 * now and will have used 0.8 of it when the study ends, on the same side; where both sides are limited, also seen
 * against the coldest other station, which shares instrument and day but not the heat. Without another station
 * that comparison falls away.
 */
export function leanOf(frame: LeanFrame, points: LeanPoints): Lean | null {
  const { band, initial, endTime, repeatabilitySd, coldest } = frame
  const own = trendUsesBand(points, band, initial, endTime, repeatabilitySd)
  if (own === null) return null
  const isTwoSided = band.lower !== null && band.upper !== null
  const versus =
    isTwoSided && coldest !== undefined ? againstColdest(frame, points, coldest, own.trend) : null
  if (isTwoSided && coldest !== undefined && versus === null) return null
  return {
    trend: own.trend,
    evidence: {
      times: own.trend.n,
      slope: own.trend.slope,
      slopeP: own.slopeP,
      alpha: own.alpha,
      usedNow: own.usedNow,
      usedAtEnd: own.usedAtEnd,
      endTime,
      comparedWith: versus,
    },
  }
}

type BandUse = { trend: TrendFit; slopeP: number; alpha: number; usedNow: number; usedAtEnd: number }

/** The part of the rule that a station's own readings decide. */
function trendUsesBand(
  points: readonly TrendPoint[],
  band: Band,
  initial: number,
  endTime: number,
  repeatabilitySd: number,
): BandUse | null {
  if (points.length < leastTimes) return null
  const trend = fitTrend(points, repeatabilitySd)
  if (trend === null || trend.slope === 0) return null
  const latest = points[points.length - 1]!.time
  const now = trendAt(trend, latest)
  const end = trendAt(trend, Math.max(endTime, latest))
  const usedNow = bandUsed(band, initial, now)
  const usedAtEnd = bandUsed(band, initial, end)
  if (usedNow === null || usedAtEnd === null) return null
  const isSameSide = Math.sign(now - initial) === Math.sign(end - initial)
  if (!isSameSide || !reaches(usedNow, endTime > 26 ? 0.55 : 0.5) || !reaches(usedAtEnd, 0.8)) return null

  const isOneSided = band.lower === null || band.upper === null
  const alpha = isOneSided ? 0.1 : points.length >= 11 ? 0.02 : 0.005
  const slopeP = slopePOf(trend)
  if (slopeP >= alpha) return null
  return { trend, slopeP, alpha, usedNow, usedAtEnd }
}

/** How the comparison with the coldest other station confirms the trend, or null. */
function againstColdest(
  frame: LeanFrame,
  points: LeanPoints,
  coldest: ColdestStation,
  trend: TrendFit,
): string | null {
  const { band, initial, initialTime, endTime, repeatabilitySd } = frame
  const cold = coldest.times.map((time, i) => ({
    time,
    mean: coldest.values[i]!,
    day: coldest.days?.[i] ?? null,
  }))
  const differences: TrendPoint[] = []
  for (const point of points) {
    if (point.isInitial) continue
    const match = cold.find((c) =>
      c.day !== null && point.day !== null ? c.day === point.day : Math.abs(c.time - point.time) < sameDay,
    )
    if (match) differences.push({ ...point, mean: point.mean - match.mean })
  }
  if (differences.length >= leastSharedDays) {
    const fit = fitTrend(differences, repeatabilitySd, Math.SQRT2)
    if (fit && Math.sign(fit.slope) === Math.sign(trend.slope) && slopePOf(fit) < 0.05) return 'difference'
  }
  const { replicates, time: latest } = points[points.length - 1]!
  const known = cold.filter((c) => c.time < latest + sameDay)
  const alone = trendUsesBand(
    [
      { time: initialTime, mean: initial, replicates: points[0]!.replicates },
      ...known.map((c) => ({ ...c, replicates })),
    ],
    band,
    initial,
    endTime,
    repeatabilitySd,
  )
  return alone && Math.sign(alone.trend.slope) === Math.sign(trend.slope)
    ? 'same trend at the coldest station'
    : null
}
