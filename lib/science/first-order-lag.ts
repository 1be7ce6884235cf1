import { levenbergMarquardt } from 'ml-levenberg-marquardt'
import { ScienceError } from './guard'
import { leastSquares } from './least-squares'

/** plateau·(1 − e^(−k·(x − start))) beyond `start`, 0 before it. */
export type FirstOrderLag = { plateau: number; k: number; start: number; squares: number }

/**
 * Least-squares curve through sorted x. For a lag within one gap of x and a given k the model is linear in the rest, so
 * every gap and a grid of k are tried, the best of them refined in k; then the three together by Levenberg-Marquardt,
 * and the last digits by Gauss-Newton (checked against nls of R). Time is counted in shares of its range, so that
 * units do not matter.
 */
export function fitFirstOrderLag(x: readonly number[], y: readonly number[]): FirstOrderLag | null {
  const range = x[x.length - 1]! - x[0]!
  const share = x.map((time) => (time - x[0]!) / range)
  const best = bestOfGaps(share, y)
  if (best === null) return null
  const polished = polish(share, y, best)
  const { plateau, k, start, squares } = lastDigits(
    share,
    y,
    polished && polished.squares < best.squares && isInJar(polished) ? polished : best,
  )
  return { plateau, k: k / range, start: x[0]! + start * range, squares }
}

/** Rate constants tried, per range of x, and how far one is from the next. */
const slowest = 0.1
const kSteps = 24
const kStep = 10 ** (1 / 8)
/** Gaps that are looked at closer. */
const mostRefined = 8

function bestOfGaps(x: readonly number[], y: readonly number[]): FirstOrderLag | null {
  const inGap = new Map<number, FirstOrderLag>()
  for (let step = 0; step <= kSteps; step++) {
    for (const [gap, found] of lagsAt(x, y, slowest * kStep ** step)) {
      if (found.squares < (inGap.get(gap)?.squares ?? Infinity)) inGap.set(gap, found)
    }
  }
  return [...inGap]
    .sort(([, a], [, b]) => a.squares - b.squares)
    .slice(0, mostRefined)
    .map(([gap, found]) => refined(x, y, gap, found))
    .map((found) => ({ ...found, squares: squaresOf(x, y, found.plateau, found.k, found.start) }))
    .reduce<FirstOrderLag | null>(
      (best, found) => (best === null || found.squares < best.squares ? found : best),
      null,
    )
}

/** Golden section in ln k between the neighbours on the grid, the lag kept in its gap. */
function refined(
  x: readonly number[],
  y: readonly number[],
  gap: number,
  from: FirstOrderLag,
): FirstOrderLag {
  const golden = (Math.sqrt(5) - 1) / 2
  let best = from
  const at = (logK: number) => {
    const found = lagsAt(x, y, Math.exp(logK), gap).get(gap)
    if (found && found.squares < best.squares) best = found
    return found?.squares ?? Infinity
  }
  let low = Math.log(from.k / kStep)
  let high = Math.log(from.k * kStep)
  for (let round = 0; round < 30; round++) {
    const inner = high - golden * (high - low)
    const outer = low + golden * (high - low)
    if (at(inner) <= at(outer)) high = outer
    else low = inner
  }
  return best
}

/**
 * The best curve of one k for every gap before x (or only one), by its index: beyond the lag it is
 * plateau − b·e^(−kx), linear in both, with the lag ln(b/plateau)/k; where that leaves the gap, the lag stands at its end.
 */
function lagsAt(
  x: readonly number[],
  y: readonly number[],
  k: number,
  only?: number,
): Map<number, FirstOrderLag> {
  const found = new Map<number, FirstOrderLag>()
  let [n, e, ee, ey, sumY] = [0, 0, 0, 0, 0]
  const total = y.reduce((sum, value) => sum + value * value, 0)
  for (let i = x.length - 1; i >= 0; i--) {
    const fall = Math.exp(-k * x[i]!)
    n += 1
    e += fall
    ee += fall * fall
    ey += fall * y[i]!
    sumY += y[i]!
    if ((only !== undefined && only !== i) || x[i - 1] === x[i]) continue
    const gapStart = i === 0 ? -Infinity : x[i - 1]!
    const starts = [gapStart, x[i]!]
    const plateau = (ee * sumY - e * ey) / (n * ee - e * e)
    const b = (e * plateau - ey) / ee
    const free = Math.log(b / plateau) / k
    if (free > gapStart && free < x[i]!) starts.push(free)
    for (const start of starts) {
      if (!Number.isFinite(start)) continue
      const rise = Math.exp(k * start)
      const shapes = n - 2 * rise * e + rise * rise * ee
      if (!(shapes > 0)) continue
      const level = (sumY - rise * ey) / shapes
      // What is before the lag stays; beyond it, the projection on the shape is taken off.
      const squares = total - level * (sumY - rise * ey)
      const lag = { plateau: level, k, start, squares }
      if (isInJar(lag) && squares < (found.get(i)?.squares ?? Infinity)) found.set(i, lag)
    }
  }
  return found
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
