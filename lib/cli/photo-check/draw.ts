import type { Chance } from '../simulate/chance'
import type { Colour, Scene } from './scene'

/** The photo's pixels, RGBA. Inverse mapping: each pixel asks where on the jar it lies. */
export function drawScene(scene: Scene, chance: Chance): Uint8Array {
  const { width, height, centre, halfWidth, tiltDegrees } = scene
  const pixels = new Uint8Array(width * height * 4)
  const cos = Math.cos((tiltDegrees * Math.PI) / 180)
  const sin = Math.sin((tiltDegrees * Math.PI) / 180)
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      const [dx, dy] = [x + 0.5 - centre.x, y + 0.5 - centre.y]
      const u = (dx * cos - dy * sin) / halfWidth
      const v = dx * sin + dy * cos
      const behind = background(scene, x, v)
      const colour = jarColour(scene, u, v, behind) ?? behind
      const dark = 1 - scene.light.vignette * ((x / width - 0.5) ** 2 + (y / height - 0.5) ** 2) * 2
      const lit = dark * (1 + scene.light.across * (x / width - 0.5) + scene.light.down * (y / height - 0.5))
      const grain = chance.normal() * scene.noise
      const at = (y * width + x) * 4
      for (let c = 0; c < 3; c += 1)
        pixels[at + c] = clamp(colour[c]! * lit + grain + (chance.uniform() - 0.5) * scene.noise)
      pixels[at + 3] = 255
    }
  }
  return pixels
}

function background({ colours, tableFrom, clutter }: Scene, x: number, v: number): Colour {
  const plain = v > tableFrom ? colours.table : colours.wall
  const isClutter = clutter && x > clutter.x && x < clutter.x + clutter.width && v < tableFrom
  return isClutter ? times(plain, clutter.shade) : plain
}

function jarColour(scene: Scene, u: number, v: number, behind: Colour): Colour | null {
  const { at, colours, light } = scene
  const round = 1 - light.roundness * (0.35 * u * u + 0.65 * u ** 6)
  if (v < at.lidTop || v > at.foot) return null
  if (v < at.lidFoot) return Math.abs(u) < 1.03 ? times(colours.lid, 1.08 * round) : null
  if (Math.abs(u) > 1 || isCorner(scene, u, v)) return null
  const body = scene.isOpaque ? times(colours.body, round) : contents(scene, u, v, behind, round)
  return glared(scene, u, v, labelled(scene, u, v, body, round))
}

function contents(scene: Scene, u: number, v: number, behind: Colour, round: number): Colour {
  const { at, colours, clear, softPx, sag } = scene
  const glass = mix(behind, [190, 200, 198], 0.22)
  const wall = Math.abs(u)
  if (wall > 0.955) return times(glass, wall > 0.985 ? 0.55 : 1.12)
  if (v > at.base) {
    const depth = (v - at.base) / (at.foot - at.base)
    return times(glass, depth < 0.15 ? 0.6 : depth > 0.85 ? 1.35 : 0.95 + 0.2 * u * u)
  }
  const bent = v - sag * (Math.sqrt(1 - u * u) - 1)
  const past = (edge: number) => smooth((bent - edge) / softPx)
  const oil = times(mix(colours.oil, behind, clear.oil), round)
  const cream = times(colours.emulsion, round)
  const water = times(mix(colours.water, behind, clear.water), round)
  let colour = isSmeared(scene, u, v)
    ? times(colours.emulsion, round * 0.97)
    : times(glass, 0.92 + 0.1 * round)
  if (at.topEdge > at.fillTop) colour = mix(colour, oil, past(at.fillTop))
  colour = mix(colour, cream, past(at.topEdge))
  if (at.bottomEdge < at.base) colour = mix(colour, water, past(at.bottomEdge))
  const line = Math.abs(bent - at.fillTop) / softPx
  return line < 1 ? plus(colour, scene.meniscus * (1 - line)) : colour
}

function labelled({ label, halfWidth }: Scene, u: number, v: number, under: Colour, round: number): Colour {
  if (!label || v < label.from || v > label.to || u < label.left || u > label.right) return under
  const line = (v - label.from) / (halfWidth * 0.16)
  const isText =
    label.isPrinted && line % 1 > 0.55 && line > 0.6 && Math.sin(u * 40 + Math.floor(line) * 5) > -0.2
  return times(isText ? times(label.colour, 0.3) : label.colour, round)
}

function glared({ glares, at }: Scene, u: number, v: number, under: Colour): Colour {
  let colour = under
  for (const glare of glares) {
    const off = Math.abs(u - glare.u) / glare.halfWidth
    if (off < 1 && v < at.foot - 4) colour = plus(colour, glare.strength * smooth(1 - off))
  }
  return colour
}

/** The lower corners of the glass are round. */
function isCorner({ at, halfWidth }: Scene, u: number, v: number): boolean {
  const radius = halfWidth * 0.12
  const [x, y] = [Math.abs(u) * halfWidth - (halfWidth - radius), v - (at.foot - radius)]
  return x > 0 && y > 0 && x * x + y * y > radius * radius
}

function isSmeared({ smears, halfWidth }: Scene, u: number, v: number): boolean {
  return smears.some((s) => ((u - s.u) * halfWidth) ** 2 + (v - s.v) ** 2 < s.radius ** 2)
}

function smooth(t: number): number {
  const x = Math.max(0, Math.min(1, t + 0.5))
  return x * x * (3 - 2 * x)
}
const times = ([r, g, b]: Colour, by: number): Colour => [r * by, g * by, b * by]
const plus = ([r, g, b]: Colour, by: number): Colour => [r + by, g + by, b + by]
const mix = (a: Colour, b: Colour, t: number): Colour => [
  a[0] + (b[0] - a[0]) * t,
  a[1] + (b[1] - a[1]) * t,
  a[2] + (b[2] - a[2]) * t,
]
const clamp = (value: number) => Math.max(0, Math.min(255, Math.round(value)))
