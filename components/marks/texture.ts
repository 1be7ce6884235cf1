import { dotSteps, polygonSteps } from './shape'
import type { Point, Step } from './shape'

/** Which way stripes run: `rising` like a slash, `falling` like a backslash. */
export type Slant = 'rising' | 'falling'

/**
 * Stripes across a convex outline, each cut exactly at its edge (Sutherland–Hodgman against the two
 * sides of the stripe), as one path. `pitch` and `thickness` are measured across the stripes. The
 * stripes hang on the drawing's origin, so that neighbouring areas share them.
 */
export function stripes(outline: Point[], pitch: number, thickness: number, slant: Slant): Step[] {
  const across = slant === 'rising' ? Math.SQRT1_2 : -Math.SQRT1_2
  const distance = ([x, y]: Point) => x * Math.SQRT1_2 + y * across
  const reach = outline.map(distance)
  const first = Math.floor((Math.min(...reach) - thickness) / pitch)
  const last = Math.ceil(Math.max(...reach) / pitch)
  const steps: Step[] = []
  for (let index = first; index <= last; index += 1) {
    const from = index * pitch
    const above = cut(outline, (point) => distance(point) - from)
    const stripe = cut(above, (point) => from + thickness - distance(point))
    if (stripe.length > 2) steps.push(...polygonSteps(stripe))
  }
  return steps
}

/** The part of a convex outline where `side` is not negative. */
function cut(outline: Point[], side: (point: Point) => number): Point[] {
  const kept: Point[] = []
  outline.forEach((point, index) => {
    const next = outline[(index + 1) % outline.length]
    if (!next) return
    const here = side(point)
    const there = side(next)
    if (here >= 0) kept.push(point)
    if (here > 0 !== there > 0 && here !== there) {
      const share = here / (here - there)
      if (share > 0 && share < 1)
        kept.push([point[0] + (next[0] - point[0]) * share, point[1] + (next[1] - point[1]) * share])
    }
  })
  return kept
}

/** Dots in a staggered grid inside a rectangle; only whole dots are drawn. */
export function dots(
  box: { left: number; top: number; right: number; bottom: number },
  pitch: number,
  r: number,
): Step[] {
  const steps: Step[] = []
  const height = box.bottom - box.top
  const rows = Math.max(1, Math.floor((height - 2 * r) / (pitch / 2) + 1e-9))
  const rowPitch = rows === 1 ? 0 : pitch / 2
  const firstY = box.top + (height - (rows - 1) * rowPitch) / 2
  for (let row = 0; row < rows; row += 1) {
    const y = firstY + row * rowPitch
    const start = row % 2 === 0 ? pitch / 4 : (pitch * 3) / 4
    for (let x = box.left + start; x <= box.right - r; x += pitch) {
      if (x - r >= box.left) steps.push(...dotSteps(x, y, r))
    }
  }
  return steps
}
