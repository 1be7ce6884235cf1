import { centredSums } from './regression'

/** 0 up to `start`, then rising by `slope` for every unit of x. */
export type Hinge = { start: number; slope: number; squares: number }

/**
 * Exact least-squares hinge slope·max(0, x − start) through sorted x: for every choice of points beyond the hinge
 * the free line through them, where its own zero falls into that gap, and otherwise the hinges at the gap's ends.
 */
export function fitHinge(x: readonly number[], y: readonly number[]): Hinge {
  let best: Hinge = { start: x[0]!, slope: 0, squares: squaresOf(x, y, x[0]!, 0) }
  const consider = (start: number, slope: number) => {
    if (!Number.isFinite(start) || !(slope > 0)) return
    const squares = squaresOf(x, y, start, slope)
    if (squares < best.squares) best = { start, slope, squares }
  }
  for (let first = 0; first < x.length - 1; first++) {
    consider(x[first]!, slopeFrom(x, y, x[first]!))
    const beyondX = x.slice(first)
    const { meanX, meanY, xx, xy } = centredSums(beyondX, y.slice(first))
    if (xx === 0) continue
    const start = meanX - meanY / (xy / xx)
    const gapStart = first === 0 ? -Infinity : x[first - 1]!
    if (start >= gapStart && start <= x[first]!) consider(start, xy / xx)
  }
  return best
}

function slopeFrom(x: readonly number[], y: readonly number[], start: number): number {
  let product = 0
  let squares = 0
  x.forEach((value, i) => {
    if (value <= start) return
    product += (value - start) * y[i]!
    squares += (value - start) ** 2
  })
  return squares === 0 ? 0 : product / squares
}

function squaresOf(x: readonly number[], y: readonly number[], start: number, slope: number): number {
  return x.reduce((sum, value, i) => sum + (y[i]! - slope * Math.max(0, value - start)) ** 2, 0)
}
