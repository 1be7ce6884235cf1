import { shelfLife } from '@/lib/science/shelf-life'
import type { SeriesFinding } from '@/lib/science/series'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { AttributeEvidence, ShelfLifeInput } from '@/lib/shelf-case/rules/content'
import { monthsOf, nominalMonths } from '@/lib/shelf-case/rules/months'

export const horizonMonths = 60

export type BatchSeries = {
  batch: string
  finding: SeriesFinding
  /** Single observations that count, the initial's included; times in weeks. */
  observations: { weeks: number; value: number }[]
}

/**
 * What one attribute supports at the station of the case. Gradual attributes are carried by regression (ICH
 * Q1E); the others, and gradual ones with fewer than three times in a batch, support the last long-term time
 * at which every jar passed [practice]. `cap` limits what regression may carry beyond the data.
 */
export function attributeEvidence(
  planned: PlannedAttribute,
  batches: BatchSeries[],
  cap: number,
): AttributeEvidence {
  const attribute = attributeOf(planned.attribute)
  const observed = batches.map((b) => ({ batch: b.batch, months: lastPassedMonths(b.finding) }))
  const least = observed.reduce<(typeof observed)[number] | null>(
    (min, b) => (min === null || b.months < min.months ? b : min),
    null,
  )
  const common = {
    attribute: attribute.key,
    label: attribute.label,
    unit: attribute.unit,
    limit: limitText(planned, attribute.unit),
    n: batches.reduce((sum, b) => sum + b.observations.length, 0),
    worst: worstOf(batches),
    band: bandOf(batches),
    reading: batches.flatMap((b) =>
      b.finding.points.map((p) => ({ batch: b.batch, months: nominalMonths(p.time) })),
    ),
  }
  const canRegress =
    attribute.isGradual &&
    batches.length > 0 &&
    batches.every((b) => new Set(b.observations.map((o) => o.weeks)).size >= 3)
  if (!canRegress) {
    return {
      ...common,
      basis: 'observed',
      scale: 'the last time at which every jar passed',
      calc: null,
      crossingMonths: null,
      supportedMonths: Math.floor(least?.months ?? 0),
      decidedBy: least?.batch ?? null,
    }
  }
  const { input, scale } = regressionInput(planned, batches)
  const output = shelfLife(input)
  return {
    ...common,
    basis: 'regression',
    scale,
    calc: { topic: 'shelf-life', input, output },
    crossingMonths: output.crossing,
    supportedMonths: Math.floor(Math.min(output.crossing ?? horizonMonths, cap)),
    decidedBy: output.crossing === null ? null : output.limitingBatch,
  }
}

/** Months up to which every counted point lay inside the band; 0 where even the first left it. */
function lastPassedMonths(finding: SeriesFinding): number {
  let passed = 0
  for (const point of finding.points) {
    if (point.isInitial || !point.counted) continue
    if (point.isBeyond) break
    passed = nominalMonths(point.time)
  }
  return passed
}

/**
 * The regression's y. Viscosity is fitted as a natural logarithm, and a tolerance relative to each batch's own
 * initial is made common by dividing by (or subtracting) that initial, so that one limit serves all batches.
 */
function regressionInput(
  planned: PlannedAttribute,
  batches: BatchSeries[],
): { input: ShelfLifeInput; scale: string } {
  const t = planned.tolerance
  const isLog = planned.attribute === 'viscosity' || t.kind === 'percent'
  const transform = (value: number, initial: number) =>
    t.kind === 'percent'
      ? Math.log(value / initial)
      : t.kind === 'shift'
        ? value - initial
        : isLog
          ? Math.log(value)
          : value
  const limit: { lower?: number; upper?: number } = {}
  if (t.kind === 'range') {
    if (t.lower !== undefined) limit.lower = isLog ? Math.log(t.lower) : t.lower
    if (t.upper !== undefined) limit.upper = isLog ? Math.log(t.upper) : t.upper
  } else if (t.kind === 'percent') {
    if (t.below !== undefined && t.below < 100) limit.lower = Math.log(1 - t.below / 100)
    if (t.above !== undefined) limit.upper = Math.log(1 + t.above / 100)
  } else {
    if (t.below !== undefined) limit.lower = -t.below
    if (t.above !== undefined) limit.upper = t.above
  }
  const direction =
    limit.lower !== undefined && limit.upper !== undefined
      ? 'either'
      : limit.lower !== undefined
        ? 'decreasing'
        : 'increasing'
  const scale =
    t.kind === 'percent'
      ? 'natural logarithm of the share of each batch’s own initial'
      : t.kind === 'shift'
        ? 'difference from each batch’s own initial'
        : isLog
          ? 'natural logarithm of the reading'
          : 'the reading'
  return {
    scale,
    input: {
      batches: batches.map((b) => ({
        name: b.batch,
        t: b.observations.map((o) => monthsOf(o.weeks)),
        y: b.observations.map((o) => transform(o.value, b.finding.initial)),
      })),
      limit,
      direction,
      confidence: 0.95,
      poolingAlpha: 0.25,
      horizon: horizonMonths,
    },
  }
}

function limitText(planned: PlannedAttribute, unit: string): string {
  const t = planned.tolerance
  const words = attributeOf(planned.attribute).words
  if (words && t.kind === 'range' && t.upper !== undefined) return `at most ${words[t.upper] ?? t.upper}`
  const signed = (n: number) => String(n).replace('-', '\u2212')
  const withUnit = (n: number) => (unit ? `${signed(n)} ${unit}` : signed(n))
  if (t.kind === 'range') {
    if (t.lower !== undefined && t.upper !== undefined) return `${signed(t.lower)} to ${withUnit(t.upper)}`
    return t.lower !== undefined ? `at least ${withUnit(t.lower)}` : `at most ${withUnit(t.upper ?? 0)}`
  }
  const of =
    t.kind === 'percent' ? ' % of the initial' : unit ? ` ${unit} from the initial` : ' from the initial'
  if (t.below !== undefined && t.above !== undefined)
    return t.below === t.above ? `within ${t.below}${of}` : `${t.below} below to ${t.above}${of} above`
  return t.below !== undefined ? `at most ${t.below}${of} below` : `at most ${t.above}${of} above`
}

function worstOf(batches: BatchSeries[]): AttributeEvidence['worst'] {
  let worst: (AttributeEvidence['worst'] & { used: number }) | null = null
  for (const b of batches) {
    if (b.finding.latest === null || b.finding.latestTime === null) continue
    const used = b.finding.used ?? 0
    if (worst === null || used > worst.used)
      worst = { batch: b.batch, months: nominalMonths(b.finding.latestTime), value: b.finding.latest, used }
  }
  return worst && { batch: worst.batch, months: worst.months, value: worst.value }
}

function bandOf(batches: BatchSeries[]): AttributeEvidence['band'] {
  const worst = worstOf(batches)
  const finding = batches.find((b) => b.batch === worst?.batch)?.finding ?? batches[0]?.finding
  return {
    lower: finding?.band.lower ?? null,
    upper: finding?.band.upper ?? null,
    initial: finding?.initial ?? null,
  }
}
