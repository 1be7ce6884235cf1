import type { Point } from '../marks/shape'

/** Convex outlines: cutting, shrinking, rounding, area. Outlines run clockwise as y runs down. */

/** The part of a convex outline where a·x + b·y is at most c (Sutherland–Hodgman, one line). */
export function cutAt(outline: Point[], a: number, b: number, c: number): Point[] {
  const kept: Point[] = []
  outline.forEach((point, index) => {
    const next = outline[(index + 1) % outline.length]
    if (!next) return
    const here = c - a * point[0] - b * point[1]
    const there = c - a * next[0] - b * next[1]
    if (here >= 0) kept.push(point)
    if (here > 0 !== there > 0 && here !== there) {
      const share = here / (here - there)
      if (share > 0 && share < 1)
        kept.push([point[0] + (next[0] - point[0]) * share, point[1] + (next[1] - point[1]) * share])
    }
  })
  return kept
}

/** Shoelace; never negative. */
export function areaOf(outline: Point[]): number {
  let twice = 0
  outline.forEach(([x, y], index) => {
    const [nextX, nextY] = outline[(index + 1) % outline.length] ?? [0, 0]
    twice += x * nextY - nextX * y
  })
  return Math.abs(twice) / 2
}

export function centreOf(outline: Point[]): Point {
  let [twice, sumX, sumY] = [0, 0, 0]
  outline.forEach(([x, y], index) => {
    const [nextX, nextY] = outline[(index + 1) % outline.length] ?? [0, 0]
    const cross = x * nextY - nextX * y
    twice += cross
    sumX += (x + nextX) * cross
    sumY += (y + nextY) * cross
  })
  return twice === 0 ? (outline[0] ?? [0, 0]) : [sumX / (3 * twice), sumY / (3 * twice)]
}

/** Every edge moved inward by `by`; nothing is left when the outline is narrower than that. */
export function shrink(outline: Point[], by: number): Point[] {
  let left = outline
  outline.forEach((from, index) => {
    const to = outline[(index + 1) % outline.length]
    if (!to || left.length === 0) return
    const [dx, dy] = [to[0] - from[0], to[1] - from[1]]
    const length = Math.hypot(dx, dy)
    if (length < 1e-9) return
    // With y running down and the outline clockwise, (dy, −dx) points outward.
    const [a, b] = [dy / length, -dx / length]
    left = cutAt(left, a, b, a * from[0] + b * from[1] - by)
  })
  return left.length > 2 ? left : []
}

/** Radius of the largest circle inside, to a thousandth of it (bisection). */
export function inradius(outline: Point[]): number {
  let [low, high] = [0, Math.sqrt(areaOf(outline) / Math.PI) * 1.01]
  for (let turn = 0; turn < 18; turn += 1) {
    const middle = (low + high) / 2
    if (shrink(outline, middle).length > 0) low = middle
    else high = middle
  }
  return low
}

/** A convex core grown by `by` all round: its corners become arcs, drawn as short chords. */
export function grow(core: Point[], by: number): Point[] {
  const grown: Point[] = []
  core.forEach((point, index) => {
    const before = core[(index - 1 + core.length) % core.length] ?? point
    const next = core[(index + 1) % core.length] ?? point
    const into = Math.atan2(-(point[0] - before[0]), point[1] - before[1])
    let out = Math.atan2(-(next[0] - point[0]), next[1] - point[1])
    while (out < into - 1e-9) out += 2 * Math.PI
    const chords = Math.max(1, Math.ceil((out - into) / (Math.PI / 10)))
    for (let chord = 0; chord <= chords; chord += 1) {
      const angle = into + ((out - into) * chord) / chords
      grown.push([point[0] + Math.cos(angle) * by, point[1] + Math.sin(angle) * by])
    }
  })
  return grown
}
