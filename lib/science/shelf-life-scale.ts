import { assertFinite, assertPositive } from './guard'
import type { Tolerance } from './series'

/**
 * The scale on which an attribute is fitted, so that one limit serves every batch: as read, as a difference from or
 * a share of each batch's own initial; what scatters by a share is fitted as a natural logarithm.
 */
export type ShelfLifeScale = 'reading' | 'log reading' | 'difference' | 'log share'

export function shelfLifeScale(tolerance: Tolerance, isLogarithmic: boolean): ShelfLifeScale {
  if (tolerance.kind === 'percent') return 'log share'
  if (tolerance.kind === 'shift') return 'difference'
  return isLogarithmic ? 'log reading' : 'reading'
}

/** A reading on the scale. Logarithms take positive values only. */
export function onScale(scale: ShelfLifeScale, value: number, initial: number): number {
  assertFinite('value', value)
  if (scale === 'reading') return value
  if (scale === 'difference') return value - initial
  assertPositive('value', value)
  if (scale === 'log reading') return Math.log(value)
  assertPositive('initial', initial)
  return Math.log(value / initial)
}

/** Back in the unit shown: the reading, its difference, or its percentage of the initial. */
export function fromScale(scale: ShelfLifeScale, y: number): number {
  if (scale === 'log share') return 100 * Math.exp(y)
  return scale === 'log reading' ? Math.exp(y) : y
}

/** The change in one unit of time that a slope stands for: in percent on logarithms, else in the reading's unit. */
export function slopeFromScale(scale: ShelfLifeScale, slope: number): number {
  return scale === 'log share' || scale === 'log reading' ? 100 * Math.expm1(slope) : slope
}

/** The tolerance's limits on the scale. A fall of all there is or more limits nothing on a logarithm. */
export function limitsOnScale(
  scale: ShelfLifeScale,
  tolerance: Tolerance,
): { lower?: number; upper?: number } {
  const side = (value: number | undefined, onSide: (value: number) => number) =>
    value === undefined ? null : onSide(value)
  const [lower, upper] =
    tolerance.kind === 'range'
      ? [
          side(tolerance.lower, (v) => onScale(scale, v, 1)),
          side(tolerance.upper, (v) => onScale(scale, v, 1)),
        ]
      : tolerance.kind === 'shift'
        ? [side(tolerance.below, (v) => -v), side(tolerance.above, (v) => v)]
        : [
            side(tolerance.below, (v) => Math.log(1 - v / 100)),
            side(tolerance.above, (v) => Math.log(1 + v / 100)),
          ]
  return {
    ...(lower !== null && Number.isFinite(lower) ? { lower } : {}),
    ...(upper !== null && Number.isFinite(upper) ? { upper } : {}),
  }
}
