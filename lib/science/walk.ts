import { bandUsed, isBeyondBand, isNearEdge } from './band'
import { judgeDay, type JudgedDay } from './judge-day'
import { leanOf, type Lean } from './lean'
import type { PullDay } from './pull-day'
import type { Band, RuleFinding, SeriesFinding, SeriesInput, SeriesPoint, Standing } from './series'

/** Counted times, the initial's included, under which a series is untold. */
const leastTold = 3

/** What every day is judged by. */
export type WalkFrame = Pick<SeriesInput, 'endTime' | 'repeatabilitySd' | 'coldest'> & {
  initial: number
  initialTime: number
  band: Band
}

/** A series as it stood after its latest day. Never changed: each step gives a new one, so a day can be tried. */
export type Walk = {
  frame: WalkFrame
  points: readonly SeriesPoint[]
  /** Of these, the ones that count. */
  counted: readonly SeriesPoint[]
  /** What the days themselves found: doubts and runs outside. */
  rules: readonly RuleFinding[]
  standing: Standing
  lean: Lean | null
  leanSince: number
  /** The unbroken run near the edge, and the one outside. */
  edge: RuleFinding | null
  out: RuleFinding | null
}

/** A series on the day it is made: the initial alone. */
export function startWalk(
  input: Pick<SeriesInput, 'endTime' | 'repeatabilitySd' | 'initialTime' | 'coldest' | 'initial'>,
  initial: number,
  band: Band,
): Walk {
  const { endTime, repeatabilitySd, initialTime = 0, coldest } = input
  const first = initialPoint(initialTime, initial, input.initial.length)
  return {
    frame: { endTime, repeatabilitySd, initialTime, coldest, initial, band },
    points: [first],
    counted: [first],
    rules: [],
    standing: 'untold',
    lean: null,
    leanSince: initialTime,
    edge: null,
    out: null,
  }
}

/** Judges a day from what came before it, and keeps since when a finding has held without a break. */
export function stepDay(walk: Walk, day: PullDay): Walk {
  const { frame } = walk
  const { band, initial, repeatabilitySd } = frame
  const judged = judgeDay(day, walk.counted, band, repeatabilitySd)
  const point = pointOf(day, judged, isBeyondBand(band, judged.mean), walk.standing)
  const points = [...walk.points, point]
  const rules = judged.rules.length > 0 ? [...walk.rules, ...judged.rules] : walk.rules
  if (!judged.counted) return { ...walk, points, rules }

  const counted = [...walk.counted, point]
  const lean = leanOf(frame, counted)
  const leanSince = lean !== null && walk.lean === null ? day.time : walk.leanSince
  const used = bandUsed(band, initial, point.mean)
  const isAtEdge = used !== null && isNearEdge(used) && !judged.isConfirmedOut
  const edge = isAtEdge ? edgeRule(walk.edge, point, used, band, initial) : null
  const out = judged.isConfirmedOut ? outRule(walk.out, point, day, band) : null
  point.standing = judged.isConfirmedOut
    ? 'out'
    : lean
      ? 'leaning'
      : counted.length >= leastTold
        ? 'steady'
        : 'untold'
  return {
    frame,
    points,
    counted,
    rules: withRun(rules, walk.out, out),
    standing: point.standing,
    lean,
    leanSince,
    edge,
    out,
  }
}

/** Doubts, runs outside and a run near the edge, in the order they came. */
export function walkFindings(walk: Walk): RuleFinding[] {
  return walk.edge ? [...walk.rules, walk.edge] : [...walk.rules]
}

/** A run that goes on keeps its place among the findings and carries the latest numbers. */
function withRun(
  rules: readonly RuleFinding[],
  running: RuleFinding | null,
  now: RuleFinding | null,
): readonly RuleFinding[] {
  if (now === null) return rules
  return running === null ? [...rules, now] : rules.map((rule) => (rule === running ? now : rule))
}

function initialPoint(time: number, initial: number, replicates: number): SeriesPoint {
  return {
    time,
    day: null,
    mean: initial,
    replicates,
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
  if (running) return { ...running, evidence }
  return { rule: 'out', level: 'out', at: point.time, readingId: point.countedIds[0]!, evidence }
}
