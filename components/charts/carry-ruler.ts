import type { Shape, Words } from '../marks/shape'
import { stripes } from '../marks/texture'
import type { CarryInput } from './carry-data'

/** Where the ruler's line lies below the drawing's top. */
const RULER = 52

export type Frame = {
  x: (months: number) => number
  width: number
  zero: number
  end: number
  isNarrow: boolean
  bottom: number
}

export function words(one: Omit<Words, 'kind' | 'weight' | 'anchor' | 'fill'> & Partial<Words>): Shape {
  return { weight: 430, anchor: 'start', fill: 'ink', ...one, kind: 'text' }
}

export function ruler(input: CarryInput, { x, zero, end, isNarrow }: Frame): Shape[] {
  const shapes: Shape[] = [
    { kind: 'line', x1: zero, x2: end, y1: RULER, y2: RULER, stroke: 'ink', width: 1.75 },
    words({ x: zero, y: 16, text: 'month', size: 13, anchor: 'middle', fill: 'soft' }),
  ]
  for (let month = 0; month <= input.endMonths; month += 1) {
    const isLong = input.ticks.includes(month)
    if (isNarrow && !isLong) continue
    const length = isLong ? 11 : month % 3 === 0 ? 7 : 4
    shapes.push({
      kind: 'line',
      x1: x(month),
      x2: x(month),
      y1: RULER,
      y2: RULER - length,
      stroke: 'ink',
      width: isLong ? 1.75 : 0.9,
    })
  }
  let last = -Infinity
  for (const month of input.ticks) {
    const isUnderTag = input.proposedMonths !== null && Math.abs(x(month) - x(input.proposedMonths)) < 56
    if (x(month) - last < 26 || isUnderTag) continue
    last = x(month)
    shapes.push(words({ x: x(month), y: 36, text: String(month), size: 17, weight: 600, anchor: 'middle' }))
  }
  const readX = x(input.readToMonths)
  const hasRoom = readX - zero > 80 && (input.proposedMonths === null || x(input.proposedMonths) - readX > 84)
  if (!isNarrow && hasRoom)
    shapes.push(words({ x: readX, y: 16, text: 'read to here', size: 13, anchor: 'middle', fill: 'soft' }))
  return shapes
}

export function capLine(
  { capMonths, capText, proposedMonths, endMonths }: CarryInput,
  frame: Frame,
): Shape[] {
  if (capMonths === null || capMonths >= endMonths) return []
  const { x, end, bottom } = frame
  const at = x(capMonths)
  const isClear = proposedMonths === null || Math.abs(x(proposedMonths) - at) > 84
  return [
    {
      kind: 'path',
      fill: 'soft',
      steps: stripes(
        [
          [at, RULER + 1],
          [end, RULER + 1],
          [end, RULER + 7],
          [at, RULER + 7],
        ],
        5,
        1,
        'falling',
      ),
    },
    { kind: 'line', x1: at, x2: at, y1: RULER, y2: bottom, stroke: 'ink', width: 1.25 },
    ...(capText && isClear
      ? [words({ x: at, y: 16, text: capText, size: 13, anchor: 'middle', fill: 'soft' })]
      : []),
  ]
}

export function proposed({ proposedMonths }: CarryInput, { x, bottom }: Frame): Shape[] {
  if (proposedMonths === null) return []
  const at = x(proposedMonths)
  return [
    { kind: 'line', x1: at, x2: at, y1: RULER, y2: bottom, stroke: 'ink', width: 1.75 },
    { kind: 'rect', x: at - 41, y: 0, w: 82, h: 46, rx: 3, fill: 'ink' },
    { kind: 'path', fill: 'ink', steps: [['M', at - 6, 45], ['L', at + 6, 45], ['L', at, 53], ['Z']] },
    words({ x: at, y: 18, text: 'proposed', size: 13, weight: 500, anchor: 'middle', fill: 'onInk' }),
    words({
      x: at,
      y: 37,
      text: String(proposedMonths),
      size: 17,
      weight: 700,
      anchor: 'middle',
      fill: 'onInk',
    }),
  ]
}
