import { centredSums } from './regression'

/** 0 up to `start`, then rising by `slope` for every unit of x. */
export type Hinge = { start: number; slope: number; squares: number }

/** A hinge at the time `first`, or the free line through the points from there on, and what its squares come to. */
type Candidate = { first: number; isFree: boolean; squares: number }

/** Running sums tell squares this well, as a share of those of y: what lies closer is computed in full. */
const shareOfSquares = 1e-10
/** The same for where a free line begins, as a share of the times' span. */
const shareOfSpan = 1e-9

/**
 * Exact least-squares hinge slope·max(0, x − start) through sorted x: for every choice of points beyond the hinge
 * the free line through them, where its own zero falls into that gap, and otherwise the hinges at the gap's ends.
 * One pass tells about how good each is, and only those close to the best are computed in full.
 */
export function fitHinge(x: readonly number[], y: readonly number[]): Hinge {
  const all = squaresOf(x, y, x[0]!, 0)
  let best: Hinge = { start: x[0]!, slope: 0, squares: all }
  for (const { first, isFree, squares: about } of candidatesFor(x, y)) {
    if (about > best.squares + shareOfSquares * all) break
    const { start, slope } = isFree
      ? freeLine(x, y, first)
      : { start: x[first]!, slope: slopeFrom(x, y, x[first]!) }
    if (!Number.isFinite(start) || !(slope > 0) || (isFree && !isInGap(x, first, start, 0))) continue
    const squares = squaresOf(x, y, start, slope)
    if (squares < best.squares) best = { start, slope, squares }
  }
  return best
}

/** Every choice, the best first, from sums that grow by one point at a time. */
function candidatesFor(x: readonly number[], y: readonly number[]): Candidate[] {
  const last = x.length - 1
  const tolerance = shareOfSpan * (x[last]! - x[0]!)
  const all = y.reduce((sum, value) => sum + value ** 2, 0)
  const candidates: Candidate[] = []
  let n = 0
  let sumY = 0
  // About the hinge: of distances, of their squares, of their products with y.
  let far = 0
  let farFar = 0
  let farY = 0
  // About the means of the points taken so far.
  let meanX = 0
  let meanY = 0
  let xx = 0
  let xy = 0
  for (let first = last; first >= 0; first--) {
    const step = first === last ? 0 : x[first + 1]! - x[first]!
    farFar += 2 * step * far + n * step ** 2
    farY += step * sumY
    far += n * step
    n += 1
    sumY += y[first]!
    const fromMean = x[first]! - meanX
    meanX += fromMean / n
    meanY += (y[first]! - meanY) / n
    xx += fromMean * (x[first]! - meanX)
    xy += fromMean * (y[first]! - meanY)
    if (first === last) continue
    if (farY > 0 && farFar > 0) candidates.push({ first, isFree: false, squares: all - farY ** 2 / farFar })
    if (xx > 0 && xy > 0 && isInGap(x, first, meanX - meanY / (xy / xx), tolerance)) {
      candidates.push({ first, isFree: true, squares: all - n * meanY ** 2 - xy ** 2 / xx })
    }
  }
  return candidates.toSorted((a, b) => a.squares - b.squares)
}

function isInGap(x: readonly number[], first: number, start: number, tolerance: number): boolean {
  return (first === 0 || start >= x[first - 1]! - tolerance) && start <= x[first]! + tolerance
}

function freeLine(x: readonly number[], y: readonly number[], first: number) {
  const { meanX, meanY, xx, xy } = centredSums(x.slice(first), y.slice(first))
  return xx === 0 ? { start: Infinity, slope: 0 } : { start: meanX - meanY / (xy / xx), slope: xy / xx }
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
