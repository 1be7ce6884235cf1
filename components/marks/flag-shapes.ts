import type { Role, Shape } from './shape'

/**
 * A flag 30 wide and 19 high with its number, its hoist's top at 0, 0. `out` is solid, the rest
 * hollow; `pole` is how far its pole reaches below the top.
 */
export function flagShapes({
  number,
  solid,
  pole = 0,
  role = 'alarm',
}: {
  number?: number | string
  solid: boolean
  pole?: number
  role?: Role
}): Shape[] {
  const shapes: Shape[] = []
  if (pole > 0) shapes.push({ kind: 'line', x1: 0, x2: 0, y1: 0, y2: pole, stroke: role, width: 2 })
  const width = flagWidth(number)
  shapes.push({
    kind: 'path',
    steps: [['M', 0, 0], ['L', width, 0], ['L', width - 6, 9.5], ['L', width, 19], ['L', 0, 19], ['Z']],
    fill: solid ? role : 'ground',
    stroke: role,
    width: 2,
    join: 'round',
  })
  if (number !== undefined)
    shapes.push({
      kind: 'text',
      x: (width - 5) / 2,
      y: 14.5,
      text: String(number),
      size: 14,
      weight: 700,
      anchor: 'middle',
      fill: solid ? 'onInk' : role,
    })
  return shapes
}

export function flagWidth(number?: number | string): number {
  return number === undefined ? 30 : Math.max(30, 14 + String(number).length * 8)
}
