import { assertPositive, ScienceError } from './guard'

/** A square on a picture, by its centre and its side, in pixels. */
export type Square = { x: number; y: number; side: number }
/** Red, green and blue in linear light, 0 to 1. */
export type Linear = [number, number, number]

/**
 * What a square of a picture holds. Means are taken in linear light, because that is what light adds up in.
 * `spread` is the standard deviation of the pixels' luminance ÷ its mean, `unevenness` the largest distance of a
 * quarter's mean luminance from the whole's ÷ the whole's, `clipped` the share of pixels of which a channel is at its
 * end, where more light or less leaves no trace.
 */
export type Patch = { mean: Linear; pixels: number; spread: number; unevenness: number; clipped: number }

type Picture = { width: number; height: number; data: ArrayLike<number> }

/** sRGB's transfer curve (IEC 61966-2-1): a stored value of 0 to 255 as linear light of 0 to 1. */
const linearOf = Float64Array.from({ length: 256 }, (_, stored) => {
  const v = stored / 255
  return v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4
})
/** The rows of sRGB's matrix that give Y (IEC 61966-2-1). */
export const luminance = ([r, g, b]: Linear) => 0.2126 * r + 0.7152 * g + 0.0722 * b

/** Of a picture in sRGB, four bytes a pixel. Throws where the square does not lie on it. */
export function patchOf({ width, height, data }: Picture, { x, y, side }: Square): Patch {
  assertPositive('side', side)
  const [left, top] = [Math.round(x - side / 2), Math.round(y - side / 2)]
  const size = Math.max(2, Math.round(side))
  if (left < 0 || top < 0 || left + size > width || top + size > height)
    throw new ScienceError('x', 'and y lie so that the square leaves the picture')
  const sums: Linear[] = [0, 1, 2, 3].map(() => [0, 0, 0])
  const counts = [0, 0, 0, 0]
  let [clipped, squares] = [0, 0]
  for (let py = 0; py < size; py += 1)
    for (let px = 0; px < size; px += 1) {
      const at = ((top + py) * width + left + px) * 4
      const stored = [data[at]!, data[at + 1]!, data[at + 2]!]
      const quarter = (2 * py < size ? 0 : 2) + (2 * px < size ? 0 : 1)
      const light = stored.map((v) => linearOf[v]!) as Linear
      light.forEach((v, c) => (sums[quarter]![c]! += v))
      counts[quarter]! += 1
      squares += luminance(light) ** 2
      if (stored.some((v) => v >= 254) || stored.every((v) => v <= 1)) clipped += 1
    }
  const pixels = size * size
  const over = (sum: Linear, count: number) => sum.map((v) => v / count) as Linear
  const mean = over(
    sums.reduce((all, one) => all.map((v, c) => v + one[c]!) as Linear, [0, 0, 0]),
    pixels,
  )
  const y0 = luminance(mean)
  const relative = (value: number) => (y0 > 0 ? value / y0 : 0)
  return {
    mean,
    pixels,
    spread: relative(Math.sqrt(Math.max(0, squares / pixels - y0 ** 2))),
    unevenness: Math.max(
      ...sums.map((sum, quarter) => relative(Math.abs(luminance(over(sum, counts[quarter]!)) - y0))),
    ),
    clipped: clipped / pixels,
  }
}
