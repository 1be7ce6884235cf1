import type { Point, Shape } from '../marks/shape'
import { polygonSteps } from '../marks/shape'
import { centreOf } from './convex'
import { packDrops } from './emulsion-packing'
import type { Section } from './emulsion-packing'

export type EmulsionInput = {
  /** Share of the volume that is inside, 0 to 1. */
  phi: number
  inside: 'water' | 'oil'
  /** Mean drop, measured; null where nobody has. */
  dropMicrometres: number | null
}

/** How wide a mean drop is drawn. */
export const DROP_PIXELS = 88

export type DrawnEmulsion = { shapes: Shape[]; drops: Point[][] }

export function emulsionShapes(input: EmulsionInput, section: Section): DrawnEmulsion {
  const drops = packDrops(input.phi, DROP_PIXELS, section)
  const isWaterInside = input.inside === 'water'
  const window = { kind: 'rect', x: 0, y: 0, w: section.width, h: section.height } as const
  const shapes: Shape[] = [
    ...(isWaterInside ? [{ ...window, fill: 'oil' } satisfies Shape] : waterGround(section)),
    ...drops.flatMap((drop): Shape[] => {
      const steps = polygonSteps(drop)
      const line = { stroke: 'dot', width: 1.4, join: 'round' } as const
      return isWaterInside
        ? [
            { kind: 'path', steps, fill: 'cream' },
            { kind: 'path', steps, fill: 'water', opacity: 0.16, ...line },
          ]
        : [{ kind: 'path', steps, fill: 'oil', ...line }]
    }),
    { ...window, stroke: 'ink', width: 2 },
    ...(input.dropMicrometres === null ? [] : scaleBar(input.dropMicrometres, section)),
  ]
  return { shapes, drops }
}

function waterGround({ width, height }: Section): Shape[] {
  const steps = polygonSteps([
    [0, 0],
    [width, 0],
    [width, height],
    [0, height],
  ])
  return [
    { kind: 'path', steps, fill: 'cream' },
    { kind: 'path', steps, fill: 'water', opacity: 0.16 },
  ]
}

function scaleBar(dropMicrometres: number, { height }: Section): Shape[] {
  const perMicrometre = DROP_PIXELS / dropMicrometres
  const length = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100].findLast((one) => one * perMicrometre <= 70) ?? 0.1
  const width = length * perMicrometre
  const [box, top] = [116, height - 42]
  const left = (box - width) / 2
  return [
    { kind: 'rect', x: 0, y: top, w: box, h: 42, fill: 'ground', stroke: 'ink', width: 2 },
    {
      kind: 'text',
      x: box / 2,
      y: top + 19,
      text: `${length} ${length === 1 ? 'micrometre' : 'micrometres'}`,
      size: 13,
      weight: 430,
      anchor: 'middle',
      fill: 'ink',
    },
    {
      kind: 'path',
      stroke: 'ink',
      width: 2,
      steps: [
        ['M', left, top + 30],
        ['L', left + width, top + 30],
        ['M', left, top + 25],
        ['L', left, top + 35],
        ['M', left + width, top + 25],
        ['L', left + width, top + 35],
      ],
    },
  ]
}

/** A place in the drawing for a question: the middle of a drop, or a film between two, near the right edge. */
export function spotFor(at: 'film' | 'drop', y: number, drops: Point[][], { width }: Section): Point {
  const aim: Point = [width - (at === 'drop' ? 84 : 40), y]
  const spots = at === 'drop' ? drops.map(centreOf) : drops.flat()
  const inside = spots.filter(([x]) => x > width * 0.55 && x < width - 10)
  const distance = (point: Point) => Math.hypot(point[0] - aim[0], point[1] - aim[1])
  return inside.reduce((best, point) => (distance(point) < distance(best) ? point : best), inside[0] ?? aim)
}
