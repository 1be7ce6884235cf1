import { levenbergMarquardt } from 'ml-levenberg-marquardt'
import { ScienceError } from './guard'
import { leastSquares } from './least-squares'

/** plateau·(1 − e^(−k·(x − start))) beyond `start`, 0 before it. */
export type FirstOrderLag = { plateau: number; k: number; start: number; squares: number }

/**
 * Least-squares curve through sorted x: best of a grid over lag and rate constant, the plateau being linear in them;
 * then the three together by Levenberg-Marquardt, and the last digits by Gauss-Newton (checked against nls of R).
 * Time is counted in shares of its range, so that units do not matter.
 */
export function fitFirstOrderLag(
  x: readonly number[],
  y: readonly number[],
  lineStart: number,
): FirstOrderLag | null {
  const range = x[x.length - 1]! - x[0]!
  const share = x.map((time) => (time - x[0]!) / range)
  let best: FirstOrderLag | null = null
  const starts = [(lineStart - x[0]!) / range, ...Array.from({ length: 40 }, (_, i) => i / 40)]
  for (const start of starts) {
    for (let step = 0; step <= 24; step++) {
      const found = withPlateau(share, y, 0.1 * 10 ** (step / 8), start)
      if (found && found.squares < (best?.squares ?? Infinity)) best = found
    }
  }
  if (best === null) return null
  const polished = polish(share, y, best)
  const { plateau, k, start, squares } = lastDigits(
    share,
    y,
    polished && polished.squares < best.squares && isInJar(polished) ? polished : best,
  )
  return { plateau, k: k / range, start: x[0]! + start * range, squares }
}

function withPlateau(
  x: readonly number[],
  y: readonly number[],
  k: number,
  start: number,
): FirstOrderLag | null {
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
function polish(x: readonly number[], y: readonly number[], from: FirstOrderLag): FirstOrderLag | null {
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

/** Gauss-Newton steps with exact derivatives, for as long as each is smaller than the one before and does no harm. */
function lastDigits(x: readonly number[], y: readonly number[], from: FirstOrderLag): FirstOrderLag {
  let best = from
  let previous = Infinity
  for (let round = 0; round < 30; round++) {
    const found = gaussNewton(x, y, best)
    if (found === null || !isInJar(found) || found.squares > best.squares * (1 + 1e-12)) return best
    const step = Math.hypot((found.plateau - best.plateau) / best.plateau, (found.k - best.k) / best.k)
    if (step >= previous) return best
    best = found
    previous = step
  }
  return best
}

function gaussNewton(x: readonly number[], y: readonly number[], at: FirstOrderLag): FirstOrderLag | null {
  const { plateau, k, start } = at
  const slopes = x.map((time) => {
    if (time <= start) return [0, 0, 0]
    const left = plateau * Math.exp(-k * (time - start))
    return [shapeAt(time, k, start), (time - start) * left, -k * left]
  })
  const residuals = x.map((time, i) => y[i]! - plateau * shapeAt(time, k, start))
  try {
    const [dPlateau = 0, dK = 0, dStart = 0] = leastSquares(slopes, residuals).coefficients
    const next = { plateau: plateau + dPlateau, k: k + dK, start: start + dStart }
    return { ...next, squares: squaresOf(x, y, next.plateau, next.k, next.start) }
  } catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

function isInJar({ plateau, k }: FirstOrderLag): boolean {
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
