import type { Point, Shape } from '../marks/shape'
import { dots, stripes } from '../marks/texture'

export type FormulaLayer = {
  id: string
  name: string
  /** Share of the whole volume, in percent. */
  volumePercent: number
  phase: 'oil' | 'water'
}

const LEFT = 4
const WIDTH = 64
const NECK = 10
/** Where the leader lines end. */
export const LEADER_END = 118

export type PlacedLayer = FormulaLayer & { top: number; bottom: number }

/**
 * Each line of the formula as a layer, oil above water, each as high as its share of the volume. The
 * layers fill the jar from its neck to its foot whatever they add up to, so that a draft can be drawn.
 */
export function placeLayers(layers: FormulaLayer[], height: number): PlacedLayer[] {
  const sum = layers.reduce((total, { volumePercent }) => total + Math.max(0, volumePercent), 0)
  const fill = height - NECK - 1.5
  let top = NECK
  return [
    ...layers.filter(({ phase }) => phase === 'oil'),
    ...layers.filter(({ phase }) => phase === 'water'),
  ].map((layer) => {
    const bottom = top + (sum > 0 ? (Math.max(0, layer.volumePercent) / sum) * fill : 0)
    const placed = { ...layer, top, bottom }
    top = bottom
    return placed
  })
}

/** `targets`: by layer id, how far down the table's row lies that its leader line goes to. */
export function formulaJarShapes(
  layers: FormulaLayer[],
  height: number,
  targets: Record<string, number> = {},
): Shape[] {
  const placed = placeLayers(layers, height)
  const waterTop = placed.find(({ phase }) => phase === 'water')?.top ?? height - 1.5
  const foot = height - 1.5
  const [left, right] = [LEFT, LEFT + WIDTH]
  const box = (top: number, bottom: number): Point[] => [
    [left, top],
    [right, top],
    [right, bottom],
    [left, bottom],
  ]
  const hasOil = placed.some(({ phase }) => phase === 'oil')
  const hasWater = placed.some(({ phase }) => phase === 'water')
  return [
    ...(hasOil
      ? ([
          { kind: 'rect', x: left, y: NECK, w: WIDTH, h: waterTop - NECK, fill: 'oil' },
          {
            kind: 'path',
            steps: dots({ left: left + 1, right: right - 1, top: NECK, bottom: waterTop }, 9, 1.35),
            fill: 'dot',
          },
        ] satisfies Shape[])
      : []),
    ...(hasWater
      ? ([
          { kind: 'path', steps: jarFoot(waterTop, foot, left, right), fill: 'cream' },
          { kind: 'path', steps: jarFoot(waterTop, foot, left, right), fill: 'water', opacity: 0.16 },
          { kind: 'path', steps: stripes(box(waterTop, foot - 2), 10, 2, 'rising'), fill: 'water' },
        ] satisfies Shape[])
      : []),
    ...placed.slice(0, -1).map((layer, index): Shape => {
      const isBoundary = layer.phase !== placed[index + 1]?.phase
      return {
        kind: 'line',
        x1: left,
        x2: right,
        y1: layer.bottom,
        y2: layer.bottom,
        stroke: 'dot',
        width: isBoundary ? 3 : 1,
      }
    }),
    ...placed.flatMap((layer): Shape[] => {
      const target = targets[layer.id]
      if (target === undefined) return []
      const y = (layer.top + layer.bottom) / 2
      return [
        {
          kind: 'path',
          stroke: 'ink',
          width: 0.9,
          steps: [
            ['M', right + 2, y],
            ['L', right + 8, y],
            ['L', LEADER_END - 6, target],
            ['L', LEADER_END, target],
          ],
        },
      ]
    }),
    {
      kind: 'path',
      stroke: 'ink',
      width: 3,
      steps: [
        ['M', left, 0],
        ['L', left, foot - 7],
        ['Q', left, foot, left + 7, foot],
        ['L', right - 7, foot],
        ['Q', right, foot, right, foot - 7],
        ['L', right, 0],
      ],
    },
  ]
}

function jarFoot(
  top: number,
  foot: number,
  left: number,
  right: number,
): Extract<Shape, { kind: 'path' }>['steps'] {
  return [
    ['M', left, top],
    ['L', right, top],
    ['L', right, foot - 7],
    ['Q', right, foot, right - 7, foot],
    ['L', left + 7, foot],
    ['Q', left, foot, left, foot - 7],
    ['Z'],
  ]
}
