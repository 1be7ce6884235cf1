import { assertNotNegative } from './guard'

export type Storage = 'room' | 'refrigerated' | 'frozen'

export type ExtrapolationCapInput = {
  /** Months of long-term data. */
  dataMonths: number
  storage: Storage
  /** Significant change within six months at accelerated conditions. */
  acceleratedChange: boolean
  /** Significant change at intermediate conditions; asked only where accelerated shows one. */
  intermediateChange?: boolean
  /** The data change or vary more than hardly. */
  variable: boolean
  /** The months rest on statistical analysis. */
  statistics: boolean
}

export type ExtrapolationCap = { capMonths: number; rule: string }

/**
 * The longest time that X months of long-term data may support: decision tree of ICH Q1E (2003)
 * [months seen in quotation, the factors 2X and 1.5X from memory]. Never rounded here.
 * An intermediate condition that was not examined counts as changed.
 */
export function extrapolationCap(input: ExtrapolationCapInput): ExtrapolationCap {
  const { dataMonths: x, storage, acceleratedChange, intermediateChange, variable, statistics } = input
  assertNotNegative('dataMonths', x)
  const isTrusted = statistics || !variable

  if (storage === 'frozen') return none(x, 'frozen: nothing is extrapolated')
  if (storage === 'refrigerated') {
    if (acceleratedChange)
      return none(x, 'refrigerated, significant change at accelerated: nothing is extrapolated')
    return isTrusted
      ? capped(x, 1.5, 6, 'refrigerated, no significant change at accelerated')
      : capped(x, 1, 3, 'refrigerated, variable data without statistics')
  }
  if (!acceleratedChange) {
    return isTrusted
      ? capped(x, 2, 12, 'no significant change at accelerated, data hardly variable or analysed')
      : capped(x, 1.5, 6, 'no significant change at accelerated, variable data without statistics')
  }
  if (intermediateChange === false) {
    return statistics
      ? capped(x, 1.5, 6, 'significant change at accelerated, none at intermediate, analysed')
      : capped(x, 1, 3, 'significant change at accelerated, none at intermediate, without statistics')
  }
  return none(
    x,
    intermediateChange === undefined
      ? 'significant change at accelerated, intermediate not examined: nothing is extrapolated'
      : 'significant change at accelerated and intermediate: nothing is extrapolated',
  )
}

function capped(x: number, factor: number, months: number, why: string): ExtrapolationCap {
  // A factor of 1 means "X + months" alone; there the factor sets no cap of its own.
  if (factor === 1) return { capMonths: x + months, rule: `${why}: up to X + ${months}` }
  return {
    capMonths: Math.min(factor * x, x + months),
    rule: `${why}: up to ${factor} × X, at most X + ${months}`,
  }
}

function none(x: number, rule: string): ExtrapolationCap {
  return { capMonths: x, rule }
}
