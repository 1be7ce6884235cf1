import { levenbergMarquardt } from 'ml-levenberg-marquardt'
import { fUpperTail } from './distributions'
import { assertComputable, assertNumbers, assertPositive, assertSameLength, ScienceError } from './guard'
import { fitHinge } from './hinge'

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
  const curve = new Set(x).size >= 5 ? fitFirstOrder(x, y, line.start) : null
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
  const first = y.findIndex((p, i) => p > limit && (i === y.length - 1 || y[i + 1]! > limit))
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

type FirstOrder = { plateau: number; k: number; start: number; squares: number }

/**
 * Best of a grid over lag and rate constant, the plateau being linear in them; then polished together. Time is
 * counted in shares of its range, so that units do not matter.
 */
function fitFirstOrder(x: readonly number[], y: readonly number[], lineStart: number): FirstOrder | null {
  const range = x[x.length - 1]! - x[0]!
  const share = x.map((time) => (time - x[0]!) / range)
  let best: FirstOrder | null = null
  const starts = [(lineStart - x[0]!) / range, ...Array.from({ length: 40 }, (_, i) => i / 40)]
  for (const start of starts) {
    for (let step = 0; step <= 24; step++) {
      const found = withPlateau(share, y, 0.1 * 10 ** (step / 8), start)
      if (found && found.squares < (best?.squares ?? Infinity)) best = found
    }
  }
  if (best === null) return null
  const polished = polish(share, y, best)
  const { plateau, k, start, squares } =
    polished && polished.squares < best.squares && isInJar(polished) ? polished : best
  return { plateau, k: k / range, start: x[0]! + start * range, squares }
}

function withPlateau(
  x: readonly number[],
  y: readonly number[],
  k: number,
  start: number,
): FirstOrder | null {
  let shapeSquares = 0
  let product = 0
  x.forEach((time, i) => {
    const shape = shapeAt(time, k, start)
    shapeSquares += shape * shape
    product += shape * y[i]!
  })
  if (shapeSquares === 0) return null
  const plateau = product / shapeSquares
  const found = { plateau, k, start, squares: squaresOf(x, y, plateau, k, start) }
  return isInJar(found) ? found : null
}

/** null where the curve cannot tell its parameters apart: then the grid's best stands. */
function polish(x: readonly number[], y: readonly number[], from: FirstOrder): FirstOrder | null {
  try {
    const { parameterValues } = levenbergMarquardt(
      { x: [...x], y: [...y] },
      ([plateau = 0, k = 0, start = 0]) =>
        (time) =>
          plateau * shapeAt(time, k, start),
      {
        initialValues: [from.plateau, from.k, from.start],
        gradientDifference: [1e-6 * from.plateau, 1e-6 * from.k, 1e-6],
        centralDifference: true,
        maxIterations: 300,
        errorTolerance: 1e-12,
      },
    )
    const [plateau = NaN, k = NaN, start = NaN] = parameterValues
    return { plateau, k, start, squares: squaresOf(x, y, plateau, k, start) }
  } catch (error) {
    // The package throws plain errors on a singular or lopsided normal matrix.
    if (error instanceof Error) return null
    throw error
  }
}

function isInJar({ plateau, k }: FirstOrder): boolean {
  return plateau > 0 && plateau <= 100 && k > 0
}

function squaresOf(
  x: readonly number[],
  y: readonly number[],
  plateau: number,
  k: number,
  start: number,
): number {
  return x.reduce((sum, time, i) => sum + (y[i]! - plateau * shapeAt(time, k, start)) ** 2, 0)
}

function shapeAt(time: number, k: number, start: number): number {
  return time > start ? -Math.expm1(-k * (time - start)) : 0
}
