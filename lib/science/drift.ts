import { bandUsed, toleranceBand } from './band'
import { assertComputable, assertFinite, assertNotNegative, assertNumbers, ScienceError } from './guard'
import { mean } from './mean'
import { onsetOf } from './onset'
import { pullDays } from './pull-day'
import type { SeriesFinding, SeriesInput, SeriesPoint } from './series'
import { fitTrend, leavingTimes, slopePOf } from './trend'
import { startWalk, stepDay, walkFindings } from './walk'

/**
 * Where a series stands: the drift rules over the means of its replicates, day by day in time order, as they would
 * have been judged then. A reading in doubt takes no part until a repeat settles it or a person sets the doubt
 * aside; nothing else removes one. Pure: the same readings always give the same finding.
 */
export function assessSeries(input: SeriesInput): SeriesFinding {
  assertSeries(input)
  const initial = mean(input.initial)
  const band = toleranceBand(input.tolerance, initial)
  const days = pullDays(input)
  const walk = days.reduce(stepDay, startWalk(input, initial, band))
  const { points, counted } = walk
  const rules = walkFindings(walk)

  const latest = counted.findLast((point) => !point.isInitial) ?? null
  const fit = fitTrend(counted, input.repeatabilitySd)
  const from = input.initialTime ?? 0
  const trend = fit && {
    n: fit.n,
    slope: fit.slope,
    intercept: fit.intercept,
    meanTime: fit.meanTime,
    meanValue: fit.meanValue,
    sumSquaresTime: fit.sumSquaresTime,
    sd: fit.sd,
  }
  const leaving = leavingTimes(trend, band, from, input.endTime)
  if (walk.standing === 'leaning' && walk.lean) {
    rules.push({
      rule: 'lean',
      level: 'leaning',
      at: walk.leanSince,
      ...lastReading(points),
      evidence: { ...walk.lean.evidence, ...leaving },
    })
  }
  if (input.isSeparation && input.detectionLimit !== undefined) {
    const onset = onsetOf(days, input.detectionLimit)
    if (onset) rules.push(onset)
  }
  return assertComputable('readings', {
    band,
    initial,
    standing: walk.standing,
    used: latest && bandUsed(band, initial, latest.mean),
    latest: latest && latest.mean,
    latestTime: latest && latest.time,
    slope: fit && fit.slope,
    intercept: fit && fit.intercept,
    // Points exactly on a line, of a method without scatter, leave no variation that a p could be taken from.
    slopeP: fit && fit.sd > 0 ? slopePOf(fit) : null,
    residualSd: fit && fit.residualSd,
    ...leaving,
    points,
    trend,
    rules,
  })
}

function lastReading(points: readonly SeriesPoint[]): { readingId?: string } {
  const id = points.findLast((point) => point.counted)?.countedIds[0]
  return id === undefined ? {} : { readingId: id }
}

function assertSeries(input: SeriesInput): void {
  assertNumbers('initial', input.initial, 1)
  assertNotNegative('endTime', input.endTime)
  assertNotNegative('repeatabilitySd', input.repeatabilitySd)
  if (input.detectionLimit !== undefined) assertNotNegative('detectionLimit', input.detectionLimit)
  input.readings.forEach((reading, i) => {
    assertFinite(`readings[${i}].time`, reading.time)
    assertNumbers(`readings[${i}].values`, reading.values, 1)
  })
  const cold = input.coldest
  if (!cold) return
  assertNumbers('coldest.times', cold.times, 0)
  assertNumbers('coldest.values', cold.values, 0)
  if (cold.times.length !== cold.values.length) {
    throw new ScienceError(
      'coldest.values',
      `has ${cold.values.length} values for ${cold.times.length} times`,
    )
  }
}
