import { median } from '../mean'
import { bands, changesDown, type Profile } from './profile'

/** A row at which the colour changes across most of the jar, with fractions, and how sharply (0 to 441). */
export type Edge = { at: number; strength: number }

/** What lies between two edges: rows `from` up to `to`. */
export type Segment = { from: number; to: number }

/** Edges within the rows given, the sharpest of each neighbourhood. */
export function edgesOf(profile: Profile, within: { top: number; bottom: number }): Edge[] {
  const reach = Math.max(2, Math.round((within.bottom - within.top) * 0.007))
  const changes = changesDown(profile, reach)
  const from = Math.max(reach, within.top - 3 * reach)
  const to = Math.min(profile.rows - reach, within.bottom + 4 * reach)
  const noise = median(Array.from(changes.subarray(from, to)))
  const threshold = Math.max(5, 5 * noise)
  const edges: Edge[] = []
  for (let row = from; row < to; row += 1) {
    const strength = changes[row]!
    if (strength < threshold) continue
    let isPeak = true
    for (let near = row - reach; near <= row + reach && isPeak; near += 1)
      if (changes[near]! > strength || (changes[near]! === strength && near < row)) isPeak = false
    if (isPeak) edges.push({ at: centre(changes, row, reach), strength })
  }
  return edges
}

/** Where the change has its weight, around its highest row. */
function centre(changes: Float32Array, row: number, reach: number): number {
  let [weight, moment] = [0, 0]
  for (let near = row - reach; near <= row + reach; near += 1) {
    const share = Math.max(0, changes[near]! - 0.3 * changes[row]!)
    weight += share
    moment += share * near
  }
  return moment / weight
}

export type BandColours = Float64Array

/** Mean colour of each band over some rows. */
export function coloursOf({ inside }: Profile, { from, to }: Segment): BandColours {
  const [first, end] = [Math.ceil(from), Math.max(Math.ceil(from) + 1, Math.floor(to))]
  const colours = new Float64Array(bands * 3)
  for (let row = first; row < end; row += 1)
    for (let i = 0; i < bands * 3; i += 1) colours[i]! += inside[row * bands * 3 + i]! / (end - first)
  return colours
}

/** How far apart two colours of the jar are, band by band, the middle band counting. */
export function apart(a: BandColours, b: BandColours): number {
  let square = 0
  for (let c = 0; c < 3; c += 1)
    square += median(Array.from({ length: bands }, (_, band) => a[band * 3 + c]! - b[band * 3 + c]!)) ** 2
  return Math.sqrt(square)
}

/** How the light falls off down a part of the jar: its brightness changes by this share of itself each row. */
export function lightSlope(profile: Profile, { from, to }: Segment): number {
  const half = (from + to) / 2
  const upper = brightness(coloursOf(profile, { from, to: half }))
  const lower = brightness(coloursOf(profile, { from: half, to }))
  return (2 * (lower - upper)) / (lower + upper) / ((to - from) / 2)
}

/** Distance of two colours where the first is lit `gain` times as brightly, give or take `share`. */
export function apartInLight(a: BandColours, b: BandColours, gain: number, share: number): number {
  let [dot, square] = [0, 0]
  for (let i = 0; i < a.length; i += 1) {
    dot += a[i]! * b[i]!
    square += a[i]! ** 2
  }
  const best = Math.max(gain - share, Math.min(gain + share, dot / Math.max(1, square)))
  return apart(
    a.map((value) => value * best),
    b,
  )
}

/** Mean of the three channels over all bands. */
export function brightness(colours: BandColours): number {
  return colours.reduce((sum, value) => sum + value, 0) / colours.length
}

/** Whether what stands beside the jar changes at this row too, so that the edge may be seen through the glass. */
export function changesBeside({ beside, rows }: Profile, at: number, reach: number): number {
  const row = Math.max(reach, Math.min(rows - reach - 1, Math.round(at)))
  let most = 0
  for (let side = 0; side < 2; side += 1)
    for (
      let near = Math.max(reach, row - reach);
      near <= Math.min(rows - reach - 1, row + reach);
      near += 1
    ) {
      let square = 0
      for (let c = 0; c < 3; c += 1) {
        let change = 0
        for (let k = 0; k < reach; k += 1)
          change += beside[(near + k) * 6 + side * 3 + c]! - beside[(near - 1 - k) * 6 + side * 3 + c]!
        square += (change / reach) ** 2
      }
      most = Math.max(most, Math.sqrt(square))
    }
  return most
}

/** How far the jar's colour is from what stands beside it, left or right, whichever is nearer. */
export function apartFromBeside({ inside, beside }: Profile, { from, to }: Segment): number {
  const [first, end] = [Math.ceil(from), Math.max(Math.ceil(from) + 1, Math.floor(to))]
  const sides = [0, 1].map((side) => {
    let square = 0
    for (let c = 0; c < 3; c += 1) {
      const differences: number[] = []
      for (let row = first; row < end; row += 1)
        for (let band = 1; band < bands - 1; band += 2)
          differences.push(inside[(row * bands + band) * 3 + c]! - beside[(row * 2 + side) * 3 + c]!)
      square += median(differences) ** 2
    }
    return Math.sqrt(square)
  })
  return Math.min(...sides)
}
