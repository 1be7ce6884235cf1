/**
 * Where a confidence bound of a fitted line meets a level: the smallest x not before `from` at which
 *
 *   centre + slope·(x − centreX) + sign·width·√(1/n + (x − centreX)²/sumSquaresX) = level,
 *
 * in closed form (a quadratic, one Newton step afterwards), or null where they do not meet. `width` is
 * t quantile × residual SD; 0 gives the line itself.
 */
export type BoundedLine = {
  centreX: number
  centre: number
  slope: number
  /** Observations behind the centre. */
  n: number
  /** Sum of squares behind the slope. */
  sumSquaresX: number
  width: number
}

export type Side = 1 | -1

export function boundAt(line: BoundedLine, sign: Side, x: number): number {
  const u = x - line.centreX
  return line.centre + line.slope * u + sign * line.width * Math.sqrt(1 / line.n + (u * u) / line.sumSquaresX)
}

export function boundMeets(line: BoundedLine, sign: Side, level: number, from: number): number | null {
  const gap = line.centre - level
  // Without a width the quadratic has one double root, which rounding can push off the real numbers.
  if (line.width === 0) return lineMeets(line, gap, from)
  const spread = line.width * line.width
  const roots = quadraticRoots(
    line.slope * line.slope - spread / line.sumSquaresX,
    2 * gap * line.slope,
    gap * gap - spread / line.n,
  )
  const start = from - line.centreX
  const slack = 1e-9 * (1 + Math.abs(start))
  const found = roots
    .filter((u) => u >= start - slack && isOnSide(gap + line.slope * u, sign, line, u))
    .sort((a, b) => a - b)[0]
  if (found === undefined) return null
  const polished = newtonStep(line, sign, gap, found)
  return Math.max(from, polished + line.centreX)
}

function lineMeets(line: BoundedLine, gap: number, from: number): number | null {
  if (line.slope === 0) return null
  const at = line.centreX - gap / line.slope
  return at >= from - 1e-9 * (1 + Math.abs(from)) ? Math.max(from, at) : null
}

/** Squaring lost the sign: the line must be on the other side of the level than its half-width. */
function isOnSide(distance: number, sign: Side, line: BoundedLine, u: number): boolean {
  const half = line.width * Math.sqrt(1 / line.n + (u * u) / line.sumSquaresX)
  return Math.abs(distance + sign * half) <= 1e-6 * (Math.abs(distance) + half) || half === 0
}

function newtonStep(line: BoundedLine, sign: Side, gap: number, u: number): number {
  const root = Math.sqrt(1 / line.n + (u * u) / line.sumSquaresX)
  const value = gap + line.slope * u + sign * line.width * root
  const slope = line.slope + (sign * line.width * u) / (line.sumSquaresX * root)
  const step = value / slope
  return Number.isFinite(step) && Math.abs(step) <= 1e-4 * (1 + Math.abs(u)) ? u - step : u
}

/** Real roots of ax² + bx + c, without the cancellation of the schoolbook formula. */
function quadraticRoots(a: number, b: number, c: number): number[] {
  if (a === 0) return b === 0 ? [] : [-c / b]
  const discriminant = b * b - 4 * a * c
  if (discriminant < 0) return []
  const q = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant))
  return (q === 0 ? [0] : [q / a, c / q]).filter(Number.isFinite)
}
