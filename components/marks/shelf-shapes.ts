import { heatLine } from './heat'
import type { Shape } from './shape'

/** A shelf's top edge lies at y 0, so that feet at y 0 stand on it; dotted where it is still to come. */
export function shelfShapes({
  width,
  temperatureC,
  freezeThaw = false,
  dottedFrom,
}: {
  width: number
  temperatureC: number
  freezeThaw?: boolean
  dottedFrom?: number
}): Shape[] {
  const line = freezeThaw ? 1.5 : heatLine(temperatureC)
  const pen = { kind: 'line', y1: line / 2, y2: line / 2, stroke: 'ink', width: line } as const
  const solidTo = Math.max(0, Math.min(width, dottedFrom ?? width))
  const solid: Shape = {
    ...pen,
    x1: 0,
    x2: solidTo,
    ...(freezeThaw ? { dash: [9, 5] as [number, number] } : {}),
  }
  if (solidTo >= width) return [solid]
  const dotted: Shape = {
    ...pen,
    x1: solidTo,
    x2: width,
    cap: 'round',
    dash: [0.01, Math.max(3, line * 2.1)],
  }
  return solidTo > 0 ? [solid, dotted] : [dotted]
}

/** The bracket under jars that are still only on this tablet: from `from` to `to`, y 0 at the shelf. */
export function trayShapes({ from, to }: { from: number; to: number }): Shape[] {
  return [
    {
      kind: 'path',
      steps: [
        ['M', from, 7],
        ['L', from, 13],
        ['L', to, 13],
        ['L', to, 7],
      ],
      stroke: 'ink',
      width: 2.5,
    },
  ]
}
