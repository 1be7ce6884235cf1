import { bandUsed, isBeyondBand, toleranceBand } from './band'
import { assertComputable, assertFinite, assertNotNegative, assertNumbers, ScienceError } from './guard'
import { judgeDay, type JudgedDay } from './judge-day'
import { leanOf, type Lean } from './lean'
import { mean } from './mean'
import { onsetOf } from './onset'
import { pullDays, type PullDay } from './pull-day'
import type { RuleFinding, SeriesFinding, SeriesInput, SeriesPoint, Standing } from './series'
import { fitTrend, leavingTimes } from './trend'

/** Counted times, the initial's included, under which a series is untold. */
const leastTold = 3
/** Share of the band from which a reading is flagged though its standing holds. */
const edgeFrom = 0.8

/**
 * Where a series stands: the drift rules over the means of its replicates, day by day in time order, as they would
 * have been judged then. A reading in doubt takes no part until a repeat settles it or a person sets the doubt
 * aside; nothing else removes one. Pure: the same readings always give the same finding.
 */
export function assessSeries(input: SeriesInput): SeriesFinding {
  assertSeries(input)
  const initial = mean(input.initial)
  const band = toleranceBand(input.tolerance, initial)
  const walk = walkDays(input, initial, band)
  const { points, rules } = walk

  const latest = points.findLast((point) => point.counted && !point.isInitial) ?? null
  const counted = points.filter((point) => point.counted)
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
  if (walk.lean) {
    rules.push({
      rule: 'lean',
      level: 'leaning',
      at: walk.leanSince,
      ...lastReading(points),
      evidence: { ...walk.lean.evidence, ...leaving },
    })
  }
  if (input.isSeparation && input.detectionLimit !== undefined) {
    const onset = onsetOf(walk.days, input.detectionLimit)
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
    slopeP: fit && fit.slopeP,
    residualSd: fit && fit.residualSd,
    ...leaving,
    points,
    trend,
    rules,
  })
}

type Walk = {
  days: PullDay[]
  points: SeriesPoint[]
  rules: RuleFinding[]
  standing: Standing
  lean: Lean | null
  leanSince: number
}

/** Judges each day from what came before it, and keeps since when a finding has held without a break. */
function walkDays(input: SeriesInput, initial: number, band: SeriesFinding['band']): Walk {
  const initialTime = input.initialTime ?? 0
  const days = pullDays(input)
  const points = [initialPoint(input, initial)]
  const rules: RuleFinding[] = []
  let standing: Standing = 'untold'
  let lean: Lean | null = null
  let leanSince = initialTime
  let edge: RuleFinding | null = null
  let out: RuleFinding | null = null

  for (const day of days) {
    const earlier = points.filter((point) => point.counted)
    const judged = judgeDay(day, earlier, band, input.repeatabilitySd)
    const point = pointOf(day, judged, isBeyondBand(band, judged.mean), standing)
    points.push(point)
    rules.push(...judged.rules)
    if (!judged.counted) continue

    const hadLean = lean !== null
    const seen = [...earlier, point]
    lean = leanOf({ ...input, points: seen, band, initial, initialTime })
    if (lean !== null && !hadLean) leanSince = day.time

    const used = bandUsed(band, initial, point.mean)
    const atEdge = used !== null && used >= edgeFrom && !judged.isConfirmedOut
    edge = atEdge ? edgeRule(edge, point, used, band, initial) : null
    if (judged.isConfirmedOut) {
      const isNew = out === null
      out = outRule(out, point, day, band)
      if (isNew) rules.push(out)
    } else {
      out = null
    }
    standing = judged.isConfirmedOut
      ? 'out'
      : lean
        ? 'leaning'
        : seen.length >= leastTold
          ? 'steady'
          : 'untold'
    point.standing = standing
  }
  if (edge) rules.push(edge)
  return { days, points, rules, standing, lean: standing === 'leaning' ? lean : null, leanSince }
}

function initialPoint(input: SeriesInput, initial: number): SeriesPoint {
  return {
    time: input.initialTime ?? 0,
    day: null,
    mean: initial,
    replicates: input.initial.length,
    counted: true,
    doubt: null,
    isInitial: true,
    isBeyond: false,
    wantsThirdJar: false,
    standing: 'untold',
    readingIds: [],
    countedIds: [],
  }
}

function pointOf(day: PullDay, judged: JudgedDay, isBeyond: boolean, standing: Standing): SeriesPoint {
  return {
    time: day.time,
    day: day.day,
    mean: judged.mean,
    replicates: judged.replicates,
    counted: judged.counted,
    doubt: judged.counted ? null : judged.doubts.join('; '),
    isInitial: false,
    isBeyond,
    wantsThirdJar: judged.wantsThirdJar,
    standing,
    readingIds: day.readings.map((reading) => reading.id),
    countedIds: judged.countedIds,
  }
}

/** One finding for an unbroken run of points near the edge: raised at the first, carrying the latest numbers. */
function edgeRule(
  running: RuleFinding | null,
  point: SeriesPoint,
  used: number,
  band: SeriesFinding['band'],
  initial: number,
): RuleFinding {
  const edge = point.mean > initial ? band.upper : band.lower
  return {
    rule: 'edge',
    level: 'flag',
    at: running?.at ?? point.time,
    readingId: point.countedIds[0]!,
    evidence: { mean: point.mean, used, edge, initial, time: point.time },
  }
}

/** One finding for an unbroken run outside; while it lasts its evidence follows the latest point. */
function outRule(
  running: RuleFinding | null,
  point: SeriesPoint,
  day: PullDay,
  band: SeriesFinding['band'],
): RuleFinding {
  const isLower = band.lower !== null && point.mean < band.lower
  const edge = (isLower ? band.lower : band.upper)!
  const evidence = {
    mean: point.mean,
    edge,
    side: isLower ? 'lower' : 'upper',
    by: Math.abs(point.mean - edge),
    confirmedBy: Math.max(0, day.measurements.length - 1),
    time: point.time,
  }
  if (running) {
    running.evidence = evidence
    return running
  }
  return { rule: 'out', level: 'out', at: point.time, readingId: point.countedIds[0]!, evidence }
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
