import type { SmallPicture } from './picture'

/** Where the jar stands: its axis through (x, y), half its width, and how far the axis leans to the right below. */
export type Outline = {
  x: number
  y: number
  halfWidth: number
  tiltRadians: number
  /** Share of the looked-at rows in which the weaker of the two sides shows, 0 to 1. */
  shown: number
}

const degree = Math.PI / 180
const widestTilt = 4

/**
 * The two sides of a straight-walled jar: the pair of lines, parallel and at most 4° from upright, along which most rows
 * of the picture change colour sharply. Glare makes such lines too, but inside the jar, so of equal pairs the wider wins.
 * Null where no pair shows in a third of the rows.
 */
export function findOutline({ width, height }: SmallPicture, changes: Float32Array): Outline | null {
  const [from, to] = [Math.round(height * 0.22), Math.round(height * 0.86)]
  const threshold = sharpness(changes)
  let best: (Outline & { score: number }) | null = null
  for (let tilt = -widestTilt; tilt <= widestTilt; tilt += 0.5) {
    const lean = Math.tan(tilt * degree)
    const along = { width, height, lean, threshold }
    const shown = shownAlong(changes, { ...along, from, to })
    // A line of what stands behind goes on to the picture's edge; a jar ends before.
    const beyond = shownAlong(changes, { ...along, from: 0, to: Math.round(height * 0.07) })
    const pair = bestPair(shown, beyond, width)
    if (pair && (!best || pair.score > best.score))
      best = {
        score: pair.score,
        x: (pair.left + pair.right) / 2,
        y: height / 2,
        halfWidth: (pair.right - pair.left) / 2,
        tiltRadians: tilt * degree,
        shown: Math.min(shown[pair.left]!, shown[pair.right]!),
      }
  }
  if (!best || best.shown < 0.33) return null
  const { score: _score, ...outline } = best
  return outline
}

/** The largest change of a channel from left to right, each over a few rows, so that noise counts little. */
export function changesAcross({ width, height, data }: SmallPicture): Float32Array {
  const rows = 7
  const changes = new Float32Array(width * height)
  const sums = new Float32Array(width * 3)
  for (let y = 0; y < height; y += 1) {
    for (let i = 0; i < width * 3; i += 1) {
      sums[i]! += data[y * width * 3 + i]!
      if (y >= rows) sums[i]! -= data[(y - rows) * width * 3 + i]!
    }
    const row = Math.max(0, y - (rows >> 1))
    for (let x = 2; x < width - 2; x += 1) {
      let most = 0
      for (let c = 0; c < 3; c += 1)
        most = Math.max(most, Math.abs(sums[(x + 2) * 3 + c]! - sums[(x - 2) * 3 + c]!))
      changes[row * width + x] = most / rows
    }
  }
  return changes
}

type Rows = { width: number; height: number; from: number; to: number; lean: number; threshold: number }

/** For each place at the picture's middle row, the share of rows in which the leaning line through it changes colour. */
function shownAlong(changes: Float32Array, { width, height, from, to, lean, threshold }: Rows): Float32Array {
  const counts = new Float32Array(width)
  for (let y = from; y < to; y += 1) {
    const shift = Math.round(lean * (y - height / 2))
    for (let x = 3; x < width - 3; x += 1) {
      const at = x + shift
      if (at < 2 || at >= width - 2) continue
      if (changes[y * width + at]! > threshold) counts[x]! += 1
    }
  }
  for (let x = 0; x < width; x += 1) counts[x]! /= to - from
  return counts
}

function bestPair(
  shown: Float32Array,
  beyond: Float32Array,
  width: number,
): { left: number; right: number; score: number } | null {
  const peaks = peaksOf(shown)
  let best: { left: number; right: number; score: number } | null = null
  for (const left of peaks)
    for (const right of peaks) {
      const wide = (right - left) / width
      if (wide < 0.2) continue
      const offCentre = Math.abs(left + right - width) / width
      const weaker = Math.min(shown[left]!, shown[right]!)
      const through = Math.max(mostNear(beyond, left), mostNear(beyond, right))
      const score = 1.5 * weaker + shown[left]! + shown[right]! + 0.5 * wide - 0.6 * offCentre - through
      if (!best || score > best.score) best = { left, right, score }
    }
  return best
}

function mostNear(shown: Float32Array, x: number): number {
  return Math.max(...shown.subarray(Math.max(0, x - 3), x + 4))
}

function peaksOf(shown: Float32Array): number[] {
  const peaks: number[] = []
  for (let x = 3; x < shown.length - 3; x += 1) {
    const around = shown.subarray(x - 3, x + 4)
    if (shown[x]! > 0.25 && shown[x]! >= Math.max(...around)) peaks.push(x)
  }
  return peaks
}

/** What counts as a sharp change: well above what most of the picture shows. */
export function sharpness(changes: Float32Array): number {
  return 3 * middle(changes) + 5
}

function middle(values: Float32Array): number {
  const sorted = Float32Array.from(values).sort()
  return sorted[sorted.length >> 1]!
}
