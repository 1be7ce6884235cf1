import { tQuantile } from './distributions'
import { assertComputable, assertFinite, assertPositive, ScienceError } from './guard'
import { boundAt, boundMeets, type BoundedLine } from './meeting'
import { fitPooling, type BatchData, type PoolingTest, type ShelfLifeModel } from './pooling'
import { assertConfidence } from './regression'

export type ShelfLifeInput = {
  batches: BatchData[]
  limit: { lower?: number; upper?: number }
  direction: 'decreasing' | 'increasing' | 'either'
  confidence?: number
  poolingAlpha?: number
  horizon: number
}

export type ShelfLifeBatch = {
  name: string
  slope: number
  intercept: number
  residualSd: number
  df: number
  /** null where the bound stays inside up to the horizon. */
  crossing: number | null
  side: 'lower' | 'upper' | null
}

export type ShelfLife = {
  model: ShelfLifeModel
  tests: PoolingTest[]
  batches: ShelfLifeBatch[]
  crossing: number | null
  /** The batch that crosses first; null where none does, or where all share one line. */
  limitingBatch: string | null
}

/**
 * Supported time by ICH Q1E (2003): batches pooled as far as F tests allow, then the time at which the confidence
 * bound of the mean line meets the limit, one-sided on the side that moves (`decreasing`: lower, `increasing`:
 * upper), two-sided against both limits for `either`. A bound already outside at time 0 crosses at 0. Each y is one
 * observation. Closed form, not a search.
 */
export function shelfLife(input: ShelfLifeInput): ShelfLife {
  const { batches, direction, confidence = 0.95, poolingAlpha = 0.25, horizon } = input
  const limits = limitsOf(input)
  assertConfidence(confidence)
  assertPositive('horizon', horizon)
  assertFinite('poolingAlpha', poolingAlpha)
  if (poolingAlpha < 0 || poolingAlpha > 1) {
    throw new ScienceError('poolingAlpha', `must lie from 0 to 1, not ${poolingAlpha}`)
  }

  const { model, tests, lines, residualSd, df } = fitPooling(batches, poolingAlpha)
  const quantile = boundQuantile(direction, confidence, df)
  const found = lines.map(({ name, line, intercept }) => {
    const bounded = { ...line, width: quantile * residualSd }
    return { name, slope: line.slope, intercept, residualSd, df, ...firstCrossing(bounded, limits, horizon) }
  })
  const first = found.reduce<ShelfLifeBatch | null>(
    (least, b) => (b.crossing !== null && (least?.crossing ?? Infinity) > b.crossing ? b : least),
    null,
  )
  const isShared = model === 'common line' && batches.length > 1
  return assertComputable('batches', {
    model,
    tests,
    batches: found,
    crossing: first?.crossing ?? null,
    limitingBatch: isShared ? null : (first?.name ?? null),
  })
}

/** One-sided where the attribute moves one way, two-sided where it may move either (ICH Q1E, 2003). */
export function boundQuantile(
  direction: ShelfLifeInput['direction'],
  confidence: number,
  df: number,
): number {
  return tQuantile(direction === 'either' ? 1 - (1 - confidence) / 2 : confidence, df)
}

type Limits = { lower: number | null; upper: number | null }

function limitsOf({ limit, direction }: ShelfLifeInput): Limits {
  if (limit.lower !== undefined) assertFinite('limit.lower', limit.lower)
  if (limit.upper !== undefined) assertFinite('limit.upper', limit.upper)
  const lower = direction === 'increasing' ? null : (limit.lower ?? null)
  const upper = direction === 'decreasing' ? null : (limit.upper ?? null)
  if (lower === null && upper === null) {
    const wanted = {
      decreasing: 'a lower limit',
      increasing: 'an upper limit',
      either: 'a lower or an upper limit',
    }
    throw new ScienceError('limit', `needs ${wanted[direction]} for direction "${direction}"`)
  }
  if (lower !== null && upper !== null && lower >= upper) {
    throw new ScienceError('limit', `lower ${lower} is not under upper ${upper}`)
  }
  return { lower, upper }
}

function firstCrossing(
  line: BoundedLine,
  limits: Limits,
  horizon: number,
): { crossing: number | null; side: 'lower' | 'upper' | null } {
  const lower = limits.lower === null ? null : crossingOf(line, -1, limits.lower, horizon)
  const upper = limits.upper === null ? null : crossingOf(line, 1, limits.upper, horizon)
  if (lower !== null && (upper === null || lower <= upper)) return { crossing: lower, side: 'lower' }
  return upper !== null ? { crossing: upper, side: 'upper' } : { crossing: null, side: null }
}

function crossingOf(line: BoundedLine, sign: 1 | -1, level: number, horizon: number): number | null {
  if (sign * (boundAt(line, sign, 0) - level) >= 0) return 0
  const time = boundMeets(line, sign, level, 0)
  return time === null || time > horizon ? null : time
}
