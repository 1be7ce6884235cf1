import { fUpperTail } from './distributions'
import { assertComputable, assertNumbers, assertPositive, assertSameLength, ScienceError } from './guard'
import { fitFirstOrderLag } from './first-order-lag'
import { fitHinge } from './hinge'
import { isAbove } from './rounding'

export type SeparationCurveInput = { t: number[]; percent: number[]; detectPercent?: number }

export type SeparationCurve = {
  /** When separation first passes its detection limit, interpolated; null where it does not. */
  onset: number | null
  /** Points per unit of time when it begins; null without separation. */
  rate: number | null
  /** Level it settles at, in % of fill height; null where no end is seen. */
  plateau: number | null
  residualSd: number
  model: 'none' | 'linear' | 'first order after a lag'
}

/**
 * Shape of a separation curve [practice]: nothing above the detection limit; a straight line from when it begins; or
 * S∞(1 − e^(−k(t−t₀))) for t > t₀, where that explains significantly more (F test at 0.05, from five times on) and
 * settles within the jar. `rate` is the line's slope, or S∞·k. A single pull above the limit with the next one below
 * it again is not yet an onset.
 */
export function separationCurve({ t, percent, detectPercent = 1 }: SeparationCurveInput): SeparationCurve {
  assertNumbers('t', t, 3)
  assertNumbers('percent', percent, 3)
  assertSameLength('t', t, 'percent', percent)
  assertPositive('detectPercent', detectPercent)
  percent.forEach((p, i) => {
    if (p < 0 || p > 100) throw new ScienceError(`percent[${i}]`, `must lie from 0 to 100, not ${p}`)
  })
  const order = t.map((_, i) => i).sort((a, b) => t[a]! - t[b]!)
  const x = order.map((i) => t[i]!)
  const y = order.map((i) => percent[i]!)
  if (x[0] === x[x.length - 1]) throw new ScienceError('t', 'has no spread: all times are equal')

  const onset = onsetTime(x, y, detectPercent)
  if (onset === null) {
    const residualSd = Math.sqrt(y.reduce((sum, p) => sum + p * p, 0) / y.length)
    return assertComputable('percent', { onset: null, rate: null, plateau: null, residualSd, model: 'none' })
  }
  const line = fitHinge(x, y)
  const curve = new Set(x).size >= 5 ? fitFirstOrderLag(x, y) : null
  if (curve && isBetter(curve.squares, line.squares, x.length - 3)) {
    return assertComputable('percent', {
      onset,
      rate: curve.plateau * curve.k,
      plateau: curve.plateau,
      residualSd: Math.sqrt(curve.squares / (x.length - 3)),
      model: 'first order after a lag',
    })
  }
  return assertComputable('percent', {
    onset,
    rate: line.slope,
    plateau: null,
    residualSd: Math.sqrt(line.squares / (x.length - 2)),
    model: 'linear',
  })
}

function onsetTime(x: readonly number[], y: readonly number[], limit: number): number | null {
  const first = y.findIndex((p, i) => isAbove(p, limit) && (i === y.length - 1 || isAbove(y[i + 1]!, limit)))
  if (first === -1) return null
  if (first === 0) return x[0]!
  const before = Math.min(y[first - 1]!, limit)
  return x[first - 1]! + ((limit - before) / (y[first]! - before)) * (x[first]! - x[first - 1]!)
}

function isBetter(squares: number, lineSquares: number, df: number): boolean {
  if (df < 1 || squares >= lineSquares) return false
  if (squares === 0) return true
  return fUpperTail(((lineSquares - squares) * df) / squares, 1, df) < 0.05
}
