import { assertFinite, assertNotNegative, ScienceError } from './guard'
import { asDecimal, isAbove, reaches } from './rounding'
import type { Band, Tolerance } from './series'

/**
 * The band from the protocol's tolerance and the batch's own initial: an absolute range, ± % of the initial, or a
 * shift in units from it. What is left out leaves that side open.
 */
export function toleranceBand(tolerance: Tolerance, initial: number): Band {
  assertFinite('initial', initial)
  const band = bandOf(tolerance, initial)
  if (band.lower === null && band.upper === null) {
    throw new ScienceError('tolerance', 'gives no limit: name at least one side')
  }
  if (band.lower !== null && band.upper !== null && band.lower >= band.upper) {
    throw new ScienceError(
      'tolerance',
      `the lower limit ${band.lower} is not under the upper limit ${band.upper}`,
    )
  }
  return band
}

function bandOf(tolerance: Tolerance, initial: number): Band {
  if (tolerance.kind === 'range') {
    return {
      lower: limit('tolerance.lower', tolerance.lower),
      upper: limit('tolerance.upper', tolerance.upper),
    }
  }
  const below = distance('tolerance.below', tolerance.below)
  const above = distance('tolerance.above', tolerance.above)
  const unit = tolerance.kind === 'percent' ? Math.abs(initial) / 100 : 1
  return {
    lower: below === null ? null : asDecimal(initial - below * unit),
    upper: above === null ? null : asDecimal(initial + above * unit),
  }
}

function limit(field: string, value: number | undefined): number | null {
  if (value === undefined) return null
  assertFinite(field, value)
  return value
}

function distance(field: string, value: number | undefined): number | null {
  if (value === undefined) return null
  assertNotNegative(field, value)
  return value
}

export function isBeyondBand(band: Band, value: number): boolean {
  return sideBeyond(band, value) !== null
}

export function sideBeyond(band: Band, value: number): 'lower' | 'upper' | null {
  if (band.lower !== null && isAbove(band.lower, value)) return 'lower'
  if (band.upper !== null && isAbove(value, band.upper)) return 'upper'
  return null
}

/**
 * Share of the distance from the initial to the edge on the value's side: 0 at the initial, 1 at the edge, 0 where
 * that side is open. null where the initial itself stands on or beyond that edge, which leaves no distance to use.
 */
export function bandUsed(band: Band, initial: number, value: number): number | null {
  if (value === initial) return isBeyondBand(band, initial) ? null : 0
  const edge = value > initial ? band.upper : band.lower
  if (edge === null) return 0
  const room = Math.abs(edge - initial)
  if (room === 0 || isBeyondBand(band, initial)) return null
  return Math.abs(value - initial) / room
}

/** Share of the band from which a reading is flagged though its standing holds. */
export const edgeFrom = 0.8

/** Whether a reading has come so near its edge that it is flagged though its standing holds. */
export function isNearEdge(used: number, from = edgeFrom): boolean {
  return reaches(used, from)
}

/** Distance from the initial to the nearer edge. */
export function nearerEdge(band: Band, initial: number): number {
  return Math.min(
    band.lower === null ? Infinity : initial - band.lower,
    band.upper === null ? Infinity : band.upper - initial,
  )
}
