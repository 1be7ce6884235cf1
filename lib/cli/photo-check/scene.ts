import type { Chance } from '../simulate/chance'

export type Colour = readonly [number, number, number]

/** Rows along the jar's axis, in pixels from the top of the picture at the middle of the jar. */
export type Lines = { fillTop: number; topEdge: number; bottomEdge: number; base: number }

export type Label = {
  from: number
  to: number
  left: number
  right: number
  colour: Colour
  isPrinted: boolean
}

/** What one drawn photo holds. Lengths in pixels along the jar's axis, `u` from -1 to 1 across the jar. */
export type Scene = {
  width: number
  height: number
  centre: { x: number; y: number }
  halfWidth: number
  tiltDegrees: number
  isOpaque: boolean
  at: {
    lidTop: number
    lidFoot: number
    fillTop: number
    topEdge: number
    bottomEdge: number
    base: number
    foot: number
  }
  softPx: number
  sag: number
  colours: {
    wall: Colour
    table: Colour
    lid: Colour
    oil: Colour
    emulsion: Colour
    water: Colour
    body: Colour
  }
  /** How much of what stands behind is seen through the oil and the water. */
  clear: { oil: number; water: number }
  tableFrom: number
  light: { across: number; down: number; roundness: number; vignette: number }
  glares: { u: number; halfWidth: number; strength: number }[]
  label: Label | null
  smears: { u: number; v: number; radius: number }[]
  clutter: { x: number; width: number; shade: number } | null
  meniscus: number
  noise: number
  jpegQuality: number
}

const emulsions: Colour[] = [
  [243, 238, 224],
  [250, 249, 246],
  [236, 220, 196],
  [238, 214, 208],
  [222, 226, 214],
  [214, 196, 168],
]
const oils: Colour[] = [
  [214, 164, 58],
  [226, 198, 110],
  [200, 140, 50],
  [228, 214, 150],
  [188, 150, 90],
]
const waters: Colour[] = [
  [140, 164, 176],
  [168, 178, 178],
  [120, 140, 150],
  [190, 196, 188],
  [150, 160, 140],
]
const walls: Colour[] = [
  [84, 92, 88],
  [46, 50, 52],
  [128, 132, 134],
  [170, 172, 168],
  [200, 202, 204],
  [96, 84, 74],
]
const tables: Colour[] = [
  [38, 42, 40],
  [120, 116, 110],
  [70, 74, 80],
  [160, 150, 136],
]
const lids: Colour[] = [
  [28, 34, 32],
  [236, 236, 234],
  [140, 30, 34],
  [190, 160, 80],
  [60, 70, 120],
]
const bodies: Colour[] = [
  [238, 238, 234],
  [30, 30, 32],
  [120, 66, 30],
  [196, 202, 204],
  [60, 96, 84],
]

/** One photo in ten is of an opaque jar. Layers are 0 to 40 % of the fill together, each none in a good third of the jars. */
export function makeScene(chance: Chance, heightPx: number): Scene {
  const pick = <T>(list: readonly T[]) => list[chance.below(list.length)]!
  const height = heightPx
  const width = Math.round(height * chance.between(0.7, 0.85))
  const jar = height * chance.between(0.58, 0.82)
  const halfWidth = Math.min(jar * chance.between(0.2, 0.36), width * 0.4)
  const centre = {
    x: width * 0.5 + chance.between(-1, 1) * (width / 2 - halfWidth) * 0.3,
    y: height * chance.between(0.47, 0.53),
  }
  const top = -jar / 2
  const lidFoot = top + jar * chance.between(0.1, 0.2)
  const foot = jar / 2
  const base = foot - jar * chance.between(0.02, 0.06)
  const fillTop = lidFoot + (base - lidFoot) * chance.between(0.05, 0.25)
  const fill = base - fillTop
  const [topShare, bottomShare] = shares(chance)
  const topEdge = fillTop + topShare * fill
  const bottomEdge = base - bottomShare * fill
  const isOpaque = chance.happens(0.1)
  return {
    ...{ width, height, centre, halfWidth, isOpaque },
    tiltDegrees: chance.between(-3, 3),
    at: { lidTop: top, lidFoot, fillTop, topEdge, bottomEdge, base, foot },
    softPx: chance.between(0.0015, 0.006) * height,
    sag: chance.between(-0.01, 0.03) * halfWidth,
    colours: {
      wall: varied(chance, pick(walls)),
      table: varied(chance, pick(tables)),
      lid: varied(chance, pick(lids)),
      oil: varied(chance, pick(oils)),
      emulsion: varied(chance, pick(emulsions)),
      water: varied(chance, pick(waters)),
      body: varied(chance, pick(bodies)),
    },
    clear: { oil: chance.between(0, 0.35), water: chance.between(0, 0.6) },
    tableFrom: foot - jar * chance.between(0, 0.12),
    light: {
      across: chance.between(-0.25, 0.25),
      down: chance.between(-0.2, 0.2),
      roundness: chance.between(0.15, 0.4),
      vignette: chance.between(0, 0.25),
    },
    glares: Array.from({ length: chance.below(3) }, () => ({
      u: chance.between(-0.85, 0.85),
      halfWidth: chance.between(0.02, 0.1),
      strength: chance.between(30, 130),
    })),
    label: labelOf(chance, { fillTop, topEdge, bottomEdge, base }, isOpaque),
    smears: chance.happens(0.25)
      ? Array.from({ length: 3 }, () => ({
          u: chance.between(-0.8, 0.8),
          v: chance.between(lidFoot, fillTop),
          radius: halfWidth * chance.between(0.04, 0.16),
        }))
      : [],
    clutter: chance.happens(0.2)
      ? {
          x: chance.happens(0.5) ? 0.02 * width : 0.9 * width,
          width: 0.08 * width,
          shade: chance.between(0.4, 1.6),
        }
      : null,
    meniscus: chance.between(-45, 25),
    noise: chance.between(1, 11),
    jpegQuality: Math.round(chance.between(40, 95)),
  }
}

/** Where the lines cross the jar's axis, as rows of the picture; null where nothing shows. */
export function trueLines({ at, centre, tiltDegrees, isOpaque }: Scene): Lines | null {
  if (isOpaque) return null
  const down = Math.cos((tiltDegrees * Math.PI) / 180)
  const y = (v: number) => centre.y + v * down
  return { fillTop: y(at.fillTop), topEdge: y(at.topEdge), bottomEdge: y(at.bottomEdge), base: y(at.base) }
}

function shares(chance: Chance): [number, number] {
  const total = chance.between(0.005, 0.4)
  const which = chance.uniform()
  if (which < 0.22) return [0, 0]
  if (which < 0.42) return [total * 0.8, 0]
  if (which < 0.62) return [0, total * 0.8]
  const onTop = chance.between(0.1, 0.9)
  return [total * onTop, total * (1 - onTop)]
}

function varied(chance: Chance, [r, g, b]: Colour): Colour {
  const by = chance.between(0.9, 1.03)
  const each = () => chance.between(-6, 6)
  return [r * by + each(), g * by + each(), b * by + each()]
}

/** None on half of the jars; else a patch on part of the width anywhere, or right across within the emulsion. */
function labelOf(
  chance: Chance,
  {
    fillTop,
    topEdge,
    bottomEdge,
    base,
  }: { fillTop: number; topEdge: number; bottomEdge: number; base: number },
  isOpaque: boolean,
): Label | null {
  if (chance.happens(0.5)) return null
  const colour: Colour = chance.happens(0.7) ? [240, 240, 236] : [60, 110, 130]
  const isPrinted = chance.happens(0.8)
  const emulsion = bottomEdge - topEdge
  if (isOpaque || chance.happens(0.35)) {
    const from = topEdge + emulsion * chance.between(0.15, 0.35)
    return {
      from,
      to: bottomEdge - emulsion * chance.between(0.15, 0.35),
      left: -1,
      right: 1,
      colour,
      isPrinted,
    }
  }
  const fill = base - fillTop
  const from = fillTop + fill * chance.between(0.02, 0.5)
  const to = from + fill * chance.between(0.2, 0.45)
  const width = chance.between(0.4, 0.85)
  const left = chance.happens(0.4) ? -width / 2 : chance.happens(0.5) ? -1 : 1 - width
  return { from, to, left, right: left + width, colour, isPrinted }
}
