import { isBeyondBand, sideBeyond } from './band'
import { median } from './mean'
import { agreementLimit, beyondOf, jumpOf, spreadOf } from './plausible'
import type { Measurement, PullDay } from './pull-day'
import { isFurther } from './rounding'
import type { Band, Evidence, RuleFinding } from './series'
import type { TrendPoint } from './trend'

/** What a pull day comes to, given the points that counted before it. */
export type JudgedDay = {
  mean: number
  replicates: number
  counted: boolean
  doubts: string[]
  isConfirmedOut: boolean
  wantsThirdJar: boolean
  countedIds: string[]
  rules: RuleFinding[]
}

export const doubtWords = {
  out: 'beyond the band, not confirmed',
  jump: 'away from where earlier readings lead',
  spread: 'replicates too far apart',
} as const

/**
 * One measurement counts where nothing speaks against it. Two that agree within their repeatability count by their
 * mean, whatever the first alone looked like; two that differ wait for a third, and then the median counts. Out is
 * confirmed where the first and its repeat are beyond the same edge and so is what counts.
 */
export function judgeDay(day: PullDay, earlier: readonly TrendPoint[], band: Band, s: number): JudgedDay {
  const [first, second] = day.measurements
  if (first === undefined) return unjudged(day)
  if (second === undefined) return judgeSingle(day, first, earlier, band, s)
  if (day.measurements.length === 2) return judgePair(day, first, second, earlier, band, s)
  const value = median(day.measurements.map((m) => m.mean))
  return counts(day, value, first.replicates, isBeyondBand(band, value))
}

function judgeSingle(
  day: PullDay,
  only: Measurement,
  earlier: readonly TrendPoint[],
  band: Band,
  s: number,
): JudgedDay {
  const { mean, replicates, range, settled } = only
  const found = doubtsOf({ time: day.time, mean, replicates, range }, settled, earlier, band, s)
  if (found.length === 0) return counts(day, only.mean, only.replicates, isBeyondBand(band, only.mean))
  return {
    mean: only.mean,
    replicates: only.replicates,
    counted: false,
    doubts: [...day.doubts, ...found.map((f) => doubtWords[f.rule])],
    isConfirmedOut: false,
    wantsThirdJar: false,
    countedIds: [],
    rules: found.map((f) => doubtRule(day, f.rule, f.evidence, only)),
  }
}

function judgePair(
  day: PullDay,
  first: Measurement,
  second: Measurement,
  earlier: readonly TrendPoint[],
  band: Band,
  s: number,
): JudgedDay {
  const a = { ...first, time: day.time }
  const b = { ...second, time: day.time }
  const difference = Math.abs(a.mean - b.mean)
  const allowed = agreementLimit(a, b, s)
  const replicates = a.replicates + b.replicates
  const value = (a.mean * a.replicates + b.mean * b.replicates) / replicates
  if (!isFurther(difference, allowed, a.mean)) {
    const side = sideBeyond(band, a.mean)
    const isOut = side !== null && side === sideBeyond(band, b.mean) && side === sideBeyond(band, value)
    return counts(day, value, replicates, isOut)
  }
  const rule = [a, b].some((m) => isBeyondBand(band, m.mean))
    ? 'out'
    : jumpOf(earlier, a, s)
      ? 'jump'
      : 'spread'
  const beyond = beyondOf(band, a.mean) ?? beyondOf(band, b.mean) ?? {}
  const evidence = { ...beyond, mean: a.mean, repeat: b.mean, difference, allowed, wants: 'a third jar' }
  return {
    mean: value,
    replicates,
    counted: false,
    doubts: [...day.doubts, 'two jars differ, a third decides'],
    isConfirmedOut: false,
    wantsThirdJar: true,
    countedIds: [],
    rules: [doubtRule(day, rule, evidence, first)],
  }
}

export type FoundDoubt = { rule: 'out' | 'jump' | 'spread'; evidence: Evidence }

/** The rules' own doubts about one measurement, less those a person set aside. */
export function doubtsOf(
  candidate: { time: number; mean: number; replicates: number; range: number },
  settled: ReadonlySet<string>,
  earlier: readonly TrendPoint[],
  band: Band,
  s: number,
): FoundDoubt[] {
  const found: FoundDoubt[] = []
  const beyond = beyondOf(band, candidate.mean)
  if (beyond && !settled.has('out')) found.push({ rule: 'out', evidence: beyond })
  const jump = jumpOf(earlier, candidate, s)
  if (jump && !settled.has('jump')) found.push({ rule: 'jump', evidence: jump })
  const spread = spreadOf(candidate, s)
  if (spread && !settled.has('spread')) found.push({ rule: 'spread', evidence: spread })
  return found
}

function counts(day: PullDay, value: number, replicates: number, isConfirmedOut: boolean): JudgedDay {
  return {
    mean: value,
    replicates,
    counted: true,
    doubts: [],
    isConfirmedOut,
    wantsThirdJar: false,
    countedIds: day.measurements.flatMap((m) => m.readingIds),
    rules: [],
  }
}

/** Every reading of the day is in doubt from outside or set aside: shown as read, not counted. */
function unjudged(day: PullDay): JudgedDay {
  const values = day.readings.flatMap((reading) => reading.values)
  return {
    mean: values.reduce((sum, value) => sum + value, 0) / values.length,
    replicates: values.length,
    counted: false,
    doubts: day.doubts,
    isConfirmedOut: false,
    wantsThirdJar: false,
    countedIds: [],
    rules: [],
  }
}

function doubtRule(day: PullDay, rule: FoundDoubt['rule'], evidence: Evidence, of: Measurement): RuleFinding {
  return { rule, level: 'doubt', at: day.time, readingId: of.readingIds[0]!, evidence }
}
