import type { JarFrame } from './jar-frame'
import { polygonSteps } from './shape'
import type { Point, Role, Shape, Step } from './shape'
import { dots, stripes } from './texture'

/** What was measured, in percent of the fill height. */
export type JarLayers = {
  topPercent?: number
  bottomPercent?: number
  /** Layers under this share of the fill cannot be read with a ruler and become a hairline. */
  detectionPercent?: number
  /** Film, beads or drops on the wall without a layer, 0 to 4. */
  bleed?: number
  /** A cream layer, apart from oil and water. */
  creamPercent?: number
}

/** From this height on a layer carries its texture; below it would be noise. */
export const TEXTURE_FROM = 3

/** Default reading limit of a ruler, a share of the fill (design: the greater of 1 % and 1 mm). */
export const DETECTION_PERCENT = 1

/**
 * Height in pixels of a layer of `percent`, to scale within the fill and never under one pixel; what
 * is under the detection limit is exactly one pixel, whatever the scale. Null where there is none.
 */
export function layerHeight(
  percent: number | undefined,
  frame: JarFrame,
  detectionPercent: number,
): number | null {
  if (percent === undefined || !(percent > 0)) return null
  if (percent < detectionPercent) return 1
  const fill = frame.fillBottom - frame.fillTop
  return Math.max(1, (Math.min(percent, 100) / 100) * fill)
}

export function layerShapes(frame: JarFrame, input: JarLayers): Shape[] {
  const limit = input.detectionPercent ?? DETECTION_PERCENT
  const bottom = layerHeight(input.bottomPercent, frame, limit)
  const top = layerHeight(input.topPercent, frame, limit)
  return [
    { kind: 'path', steps: insideSteps(frame, frame.fillTop), fill: 'cream' },
    ...(bottom === null ? [] : waterLayer(frame, bottom)),
    ...(top === null ? [] : oilLayer(frame, top)),
    ...creamLine(frame, input.creamPercent ?? 0, top ?? 0),
    ...beads(frame, input.bleed ?? 0),
  ]
}

/** The cream layer is emulsion still: only its lower edge is drawn, dotted, under what floats on it. */
function creamLine(frame: JarFrame, percent: number, top: number): Shape[] {
  if (percent <= 0) return []
  const y = frame.fillTop + top + Math.max(2, (percent / 100) * (frame.fillBottom - frame.fillTop))
  const { halfInside: x, wall } = frame
  const width = Math.max(1, wall * 0.6)
  return [{ kind: 'line', x1: -x, x2: x, y1: y, y2: y, stroke: 'dot', width, dash: [width, width * 1.6] }]
}

/** Drops on the wall, more and larger by grade; from 16 px on, where one can be told from the glass. */
function beads(frame: JarFrame, bleed: number): Shape[] {
  const { height, halfInside, fillTop, fillBottom } = frame
  if (bleed <= 0 || height < 16) return []
  const r = Math.max(0.9, height * (0.014 + 0.007 * bleed))
  const fill = fillBottom - fillTop
  return Array.from({ length: bleed + 1 }, (_, index): Shape => {
    const side = index % 2 === 0 ? 1 : -1
    const cy = fillBottom - fill * (0.3 + (0.5 * index) / Math.max(1, bleed))
    return { kind: 'circle', cx: side * (halfInside - r), cy, r, fill: 'water' }
  })
}

function waterLayer(frame: JarFrame, height: number): Shape[] {
  const surface = frame.fillBottom - height
  if (height < TEXTURE_FROM) {
    const inside = height >= frame.insideRadius ? insideSteps(frame, surface) : sliverSteps(frame, surface)
    return [{ kind: 'path', steps: inside, fill: 'water' }]
  }
  const large = frame.height >= 100 && height >= 8
  const outline = insideOutline(frame, surface)
  return [
    { kind: 'path', steps: insideSteps(frame, surface), fill: 'water' },
    {
      kind: 'path',
      steps: large ? stripes(outline, 8, 2.2, 'rising') : stripes(outline, 4, 1.3, 'rising'),
      fill: 'cream',
    },
    interfaceLine(frame, surface, 'dot'),
  ]
}

function oilLayer(frame: JarFrame, height: number): Shape[] {
  const { fillTop: top, halfGlass, halfInside } = frame
  if (height < TEXTURE_FROM)
    return [{ kind: 'rect', x: -halfInside, y: top, w: halfInside * 2, h: height, fill: 'oilLine' }]
  const large = frame.height >= 100 && height >= 9
  const box = { left: -halfInside, right: halfInside, top, bottom: top + height }
  return [
    { kind: 'rect', x: -halfGlass, y: top, w: halfGlass * 2, h: height, fill: 'oil' },
    { kind: 'path', steps: large ? dots(box, 9, 1.35) : dots(box, 4, 0.75), fill: 'dot' },
    interfaceLine(frame, top + height, 'dot'),
  ]
}

function interfaceLine({ halfGlass, wall }: JarFrame, y: number, stroke: Role): Shape {
  return {
    kind: 'line',
    x1: -halfGlass,
    x2: halfGlass,
    y1: y,
    y2: y,
    stroke,
    width: Math.min(2.5, wall * 0.7),
  }
}

/** The inside of the jar from its rounded foot up to `surface`. */
function insideSteps({ halfInside: x, fillBottom: y, insideRadius: r }: JarFrame, surface: number): Step[] {
  return [
    ['M', -x, surface],
    ['L', -x, y - r],
    ['Q', -x, y, -x + r, y],
    ['L', x - r, y],
    ['Q', x, y, x, y - r],
    ['L', x, surface],
    ['Z'],
  ]
}

/** A film thinner than the foot's rounding: it keeps to where the rounding lets it lie. */
function sliverSteps(frame: JarFrame, surface: number): Step[] {
  return polygonSteps(insideOutline(frame, surface))
}

function insideOutline(
  { halfInside: x, fillBottom: y, insideRadius: r }: JarFrame,
  surface: number,
): Point[] {
  const parts = 6
  const corner = Array.from({ length: parts + 1 }, (_, part): Point => {
    const t = part / parts
    // The quadratic from (x, y − r) by way of (x, y) to (x − r, y).
    return [x - r * t * t, y - r * (1 - t) ** 2]
  })
  const right: Point[] = [
    [halfWidthAt(surface, x, y, r), surface],
    ...corner.filter(([, py]) => py > surface + 1e-9),
  ]
  return [...right, ...[...right].reverse().map(([px, py]): Point => [-px, py])]
}

/** Half the inside's width at height `at`: the inverse of that quadratic within the rounding. */
function halfWidthAt(at: number, x: number, y: number, r: number): number {
  if (at <= y - r) return x
  const t = 1 - Math.sqrt((y - at) / r)
  return x - r * t * t
}
