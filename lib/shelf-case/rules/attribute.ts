import { monthsOf, nominalMonths } from '@/lib/science/months'
import type { SeriesFinding, SeriesInput } from '@/lib/science/series'
import { shelfLife } from '@/lib/science/shelf-life'
import { limitsOnScale, onScale, shelfLifeScale } from '@/lib/science/shelf-life-scale'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { AttributeEvidence, ShelfLifeInput } from '@/lib/shelf-case/rules/content'
import { driftCalculation } from '@/lib/shelf-case/rules/drift-calculation'
import { scaleWords } from '@/lib/shelf-case/rules/scale'

export const horizonMonths = 60

export type BatchSeries = {
  batch: string
  input: SeriesInput
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
  const attribute = attributeOf(planned.attribute, planned)
  const observed = batches.map((b) => ({ batch: b.batch, months: lastPassedMonths(b.finding) }))
  const least = observed.reduce<(typeof observed)[number] | null>(
    (min, b) => (min === null || b.months < min.months ? b : min),
    null,
  )
  const common = {
    attribute: attribute.key,
    label: attribute.label,
    unit: attribute.unit,
    ...(planned.own ? { own: planned.own } : {}),
    limit: limitText(planned, attribute.unit),
    n: batches.reduce((sum, b) => sum + b.observations.length, 0),
    worst: worstOf(batches),
    band: bandOf(batches),
    series: batches.map((b) => ({ batch: b.batch, calc: driftCalculation(b.input) })),
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
  const { input, scale } = regressionInput(
    planned,
    batches.map((b) => ({ ...b, initial: b.finding.initial })),
  )
  const output = shelfLife(input)
  return {
    ...common,
    basis: 'regression',
    scale,
    calc: { topic: 'shelf-life', input, output },
    crossingMonths: output.crossing,
    supportedMonths: regressionMonths(output.crossing, cap),
    decidedBy: output.crossing === null ? null : output.limitingBatch,
  }
}

/** Whole months, rounded down, that a regression carries: to its crossing, or the horizon, within the cap. */
export function regressionMonths(crossing: number | null, cap: number): number {
  return Math.floor(Math.min(crossing ?? horizonMonths, cap))
}

/** Months up to which every counted point lay inside the band; 0 where even the first left it. */
export function lastPassedMonths(finding: Pick<SeriesFinding, 'points'>): number {
  let passed = 0
  for (const point of finding.points) {
    if (point.isInitial || !point.counted) continue
    if (point.isBeyond) break
    passed = nominalMonths(point.time)
  }
  return passed
}

type Regressed = { batch: string; initial: number; observations: BatchSeries['observations'] }

/**
 * The regression's input. Viscosity is fitted as a natural logarithm, and a tolerance relative to each batch's own
 * initial is made common by dividing by (or subtracting) that initial, so that one limit serves all batches.
 */
export function regressionInput(
  { attribute, tolerance }: Pick<PlannedAttribute, 'attribute' | 'tolerance'>,
  batches: Regressed[],
): { input: ShelfLifeInput; scale: string } {
  const scale = shelfLifeScale(tolerance, attribute === 'viscosity')
  const limit = limitsOnScale(scale, tolerance)
  const isBoth = limit.lower !== undefined && limit.upper !== undefined
  return {
    scale: scaleWords[scale],
    input: {
      batches: batches.map((b) => ({
        name: b.batch,
        t: b.observations.map((o) => monthsOf(o.weeks)),
        y: b.observations.map((o) => onScale(scale, o.value, b.initial)),
      })),
      limit,
      direction: isBoth ? 'either' : limit.lower !== undefined ? 'decreasing' : 'increasing',
      confidence: 0.95,
      poolingAlpha: 0.25,
      horizon: horizonMonths,
    },
  }
}

function limitText(planned: PlannedAttribute, unit: string): string {
  const t = planned.tolerance
  const { words } = attributeOf(planned.attribute, planned)
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

type Judged = {
  batch: string
  finding: Pick<SeriesFinding, 'latest' | 'latestTime' | 'used' | 'band' | 'initial'>
}

/** The batch that has used most of its band, at its latest reading. */
export function worstOf(batches: Judged[]): AttributeEvidence['worst'] {
  let worst: (AttributeEvidence['worst'] & { used: number }) | null = null
  for (const b of batches) {
    if (b.finding.latest === null || b.finding.latestTime === null) continue
    const used = b.finding.used ?? 0
    if (worst === null || used > worst.used)
      worst = { batch: b.batch, months: nominalMonths(b.finding.latestTime), value: b.finding.latest, used }
  }
  return worst && { batch: worst.batch, months: worst.months, value: worst.value }
}

export function bandOf(batches: Judged[]): AttributeEvidence['band'] {
  const worst = worstOf(batches)
  const finding = batches.find((b) => b.batch === worst?.batch)?.finding ?? batches[0]?.finding
  return {
    lower: finding?.band.lower ?? null,
    upper: finding?.band.upper ?? null,
    initial: finding?.initial ?? null,
  }
}
