import { ScienceError } from '../guard'

/** Pixels row by row, red, green, blue (and alpha, which is not looked at), 0 to 255. */
export type Picture = { width: number; height: number; channels: 3 | 4; data: ArrayLike<number> }

/** As numbers with fractions, three channels, and how many pixels of the picture one of these stands for. */
export type SmallPicture = { width: number; height: number; data: Float32Array; scale: number }

/** Made smaller by means of whole blocks, so that noise falls with the block's side. Throws where sides and data disagree. */
export function shrink({ width, height, channels, data }: Picture, aboutRows: number): SmallPicture {
  if (!(width >= 1 && height >= 1) || data.length < width * height * channels)
    throw new ScienceError('data', `holds less than ${width} times ${height} pixels`)
  const scale = Math.max(1, Math.round(height / aboutRows))
  const [w, h] = [Math.floor(width / scale), Math.floor(height / scale)]
  const small = new Float32Array(w * h * 3)
  const share = 1 / (scale * scale)
  for (let y = 0; y < h * scale; y += 1) {
    const row = Math.floor(y / scale) * w
    for (let x = 0; x < w * scale; x += 1) {
      const to = (row + Math.floor(x / scale)) * 3
      const from = (y * width + x) * channels
      small[to]! += data[from]! * share
      small[to + 1]! += data[from + 1]! * share
      small[to + 2]! += data[from + 2]! * share
    }
  }
  return { width: w, height: h, data: small, scale }
}
