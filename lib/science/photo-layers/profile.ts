import { median } from '../mean'
import type { Outline } from './outline'
import type { SmallPicture } from './picture'

export const bands = 11
const samples = 7
/** The bands lie between these, well inside the glass. */
const reach = 0.84

/** The jar read row by row along its axis. Row 0 is `from` pixels from the outline's point. */
export type Profile = {
  rows: number
  from: number
  /** Colour of each band in each row: [(row * bands + band) * 3 + channel]. */
  inside: Float32Array
  /** What stands left and right beside the jar, likewise for two bands. */
  beside: Float32Array
}

export function profileOf(picture: SmallPicture, outline: Outline): Profile {
  const { height } = picture
  const from = -outline.y
  const rows = height
  const inside = new Float32Array(rows * bands * 3)
  const beside = new Float32Array(rows * 2 * 3)
  for (let row = 0; row < rows; row += 1) {
    const v = from + row
    for (let band = 0; band < bands; band += 1) {
      const left = -reach + (2 * reach * band) / bands
      fill(picture, outline, v, left, left + (2 * reach) / bands, inside, (row * bands + band) * 3)
    }
    fill(picture, outline, v, -1.22, -1.1, beside, row * 6)
    fill(picture, outline, v, 1.1, 1.22, beside, row * 6 + 3)
  }
  return { rows, from, inside, beside }
}

/** First and last row in which the jar's sides show, gaps of a few rows aside; null where they hardly do. */
export function extent(
  { width, height }: SmallPicture,
  changes: Float32Array,
  threshold: number,
  { x, y, halfWidth, tiltRadians }: Outline,
): { top: number; bottom: number } | null {
  const [cos, sin] = [Math.cos(tiltRadians), Math.sin(tiltRadians)]
  // A lid stands out a little.
  const reachAcross = Math.max(3, Math.round(halfWidth * 0.06))
  const shows = (v: number, side: 1 | -1) => {
    const py = Math.round(y - side * halfWidth * sin + v * cos)
    const px = Math.round(x + side * halfWidth * cos + v * sin)
    if (py < 0 || py >= height) return false
    for (let near = -reachAcross; near <= reachAcross; near += 1)
      if (changes[py * width + Math.max(0, Math.min(width - 1, px + near))]! > threshold) return true
    return false
  }
  const most = Math.round(height * 0.05)
  let best: { top: number; bottom: number } | null = null
  let run: { top: number; bottom: number } | null = null
  for (let row = 0; row < height; row += 1) {
    if (!shows(row - y, -1) && !shows(row - y, 1)) continue
    if (run && row - run.bottom <= most) run.bottom = row
    else run = { top: row, bottom: row }
    if (!best || run.bottom - run.top >= best.bottom - best.top) best = run
  }
  return best && best.bottom - best.top > height * 0.25 ? best : null
}

/** Mean colour between two places across the jar. */
function fill(
  { width, height, data }: SmallPicture,
  { x, y, halfWidth, tiltRadians }: Outline,
  v: number,
  left: number,
  right: number,
  into: Float32Array,
  at: number,
): void {
  const [cos, sin] = [Math.cos(tiltRadians), Math.sin(tiltRadians)]
  for (let s = 0; s < samples; s += 1) {
    const u = (left + ((right - left) * (s + 0.5)) / samples) * halfWidth
    const px = Math.max(0, Math.min(width - 1, Math.round(x + u * cos + v * sin)))
    const py = Math.max(0, Math.min(height - 1, Math.round(y - u * sin + v * cos)))
    const pixel = (py * width + px) * 3
    for (let c = 0; c < 3; c += 1) into[at + c]! += data[pixel + c]! / samples
  }
}

/**
 * How sharply the colour changes at each row: the change between the rows above and those below in each band, and of the
 * bands the middle one in each channel. A stripe of glare or a label on less than half of the width is outvoted.
 */
export function changesDown({ rows, inside }: Profile, reachRows: number): Float32Array {
  const stride = bands * 3
  const sums = new Float64Array((rows + 1) * stride)
  for (let row = 0; row < rows; row += 1)
    for (let i = 0; i < stride; i += 1)
      sums[(row + 1) * stride + i] = sums[row * stride + i]! + inside[row * stride + i]!
  const changes = new Float32Array(rows)
  for (let row = reachRows; row < rows - reachRows; row += 1) {
    let square = 0
    for (let c = 0; c < 3; c += 1) {
      const each: number[] = []
      for (let band = 0; band < bands; band += 1) {
        const i = band * 3 + c
        const here = sums[row * stride + i]!
        const above = here - sums[(row - reachRows) * stride + i]!
        const below = sums[(row + reachRows) * stride + i]! - here
        each.push((below - above) / reachRows)
      }
      square += median(each) ** 2
    }
    changes[row] = Math.sqrt(square)
  }
  return changes
}
