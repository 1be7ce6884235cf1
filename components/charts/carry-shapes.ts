import { jarShapes } from '../marks/jar-shapes'
import { moveShapes } from '../marks/place'
import type { Role, Shape } from '../marks/shape'
import { standingShapes } from '../marks/standing-shapes'
import { capLine, proposed, ruler, words } from './carry-ruler'
import type { Frame } from './carry-ruler'
import type { CarryAttribute, CarryInput, CarryReading } from './carry-data'
import { frontGeometry } from './sheet-front'

const FIRST_TOP = 66
const FIRST_SHELF = 102
const PITCH = 43

export function carryHeight({ attributes }: CarryInput): number {
  return FIRST_SHELF + PITCH * (attributes.length - 1) + 20
}

/** How far each attribute carries: one ruler, a shelf an attribute, the stepped front where it ends. */
export function carryShapes(input: CarryInput, width: number): Shape[] {
  const isNarrow = width < 640
  const zero = isNarrow ? 112 : 196
  const end = width - 22
  const x = (months: number) => zero + (months / input.endMonths) * (end - zero)
  const frame: Frame = { x, width, zero, end, isNarrow, bottom: carryHeight(input) - 9 }
  const rows = input.attributes.map((attribute, index) => {
    const shelf = FIRST_SHELF + PITCH * index
    return {
      attribute,
      shelf,
      top: index === 0 ? FIRST_TOP : shelf - PITCH + 6,
      bottom: shelf + 6,
      x: attribute.months === null ? null : x(Math.min(attribute.months, input.endMonths)),
      isForecast: true,
    }
  })
  const front = frontGeometry(rows, -Infinity, width)
  return [
    ...front.wash.map((box): Shape => ({ kind: 'rect', ...box, fill: 'wash' })),
    ...front.dashed.map((segment): Shape => ({
      kind: 'line',
      ...segment,
      stroke: 'alarm',
      width: 2,
      dash: [8, 5],
    })),
    ...capLine(input, frame),
    ...ruler(input, frame),
    ...rows.flatMap(({ attribute, shelf }) => shelfOf(attribute, shelf, input, frame)),
    ...proposed(input, frame),
  ]
}

function shelfOf(attribute: CarryAttribute, shelf: number, input: CarryInput, frame: Frame): Shape[] {
  const { x, width, isNarrow } = frame
  const { isLimiting, months } = attribute
  const line = isLimiting ? 4 : 1.75
  const readX = x(input.readToMonths) + 10
  const carriedTo = months === null ? width - 8 : x(Math.min(months, input.endMonths)) - 3
  const size = isNarrow ? 15 : isLimiting ? 20 : 17
  return [
    words({ x: 0, y: shelf - 6, text: attribute.name, size, weight: isLimiting ? 720 : 430 }),
    {
      kind: 'line',
      x1: 0,
      x2: readX,
      y1: shelf + line / 2,
      y2: shelf + line / 2,
      stroke: 'ink',
      width: line,
    },
    ...(carriedTo > readX + 4
      ? [
          {
            kind: 'line',
            x1: readX + 4,
            x2: carriedTo,
            y1: shelf + line / 2,
            y2: shelf + line / 2,
            stroke: 'ink',
            width: isLimiting ? 3 : 1.5,
            dash: [9, 6],
          } satisfies Shape,
        ]
      : []),
    ...attribute.readings.flatMap((reading) => readingShapes(reading, shelf, x, isNarrow)),
    ...(months === null ? pastTheEnd(shelf, input, frame) : fallen(attribute, months, shelf, input, frame)),
  ]
}

function readingShapes(
  { months, marks = [], jars = [] }: CarryReading,
  shelf: number,
  x: (months: number) => number,
  isNarrow: boolean,
): Shape[] {
  const height = isNarrow ? 13 : 19
  const pitch = height * 0.685
  // Where three jars find no room beside each other, the worst of them stands for the time.
  const worst = [...jars].sort((a, b) => b.topPercent + b.bottomPercent - a.topPercent - a.bottomPercent)
  const shown = isNarrow ? worst.slice(0, 1) : jars
  return [
    ...marks.map((mark, index): Shape => {
      const [cx, cy] = [x(months), shelf - 6 - index * 8]
      return mark === 'read'
        ? { kind: 'circle', cx, cy, r: isNarrow ? 2.2 : 2.7, fill: 'ink' }
        : {
            kind: 'path',
            stroke: 'ink',
            width: 1.6,
            steps: [
              ['M', cx - 3, cy - 3],
              ['L', cx + 3, cy + 3],
              ['M', cx + 3, cy - 3],
              ['L', cx - 3, cy + 3],
            ],
          }
    }),
    ...shown.flatMap((jar, index) =>
      moveShapes(jarShapes({ height, ...jar }), x(months) + (index - (shown.length - 1) / 2) * pitch, shelf),
    ),
  ]
}

/** Where an attribute ends its jar lies down: solid for the one that limits, with its months beside it. */
function fallen(
  { isLimiting }: CarryAttribute,
  months: number,
  shelf: number,
  input: CarryInput,
  { x, end, isNarrow }: Frame,
): Shape[] {
  const at = x(Math.min(months, input.endMonths))
  const size = isLimiting ? 28 : 21
  const role: Role = isLimiting ? 'alarm' : 'ink'
  const mark = standingShapes({ standing: 'out', size, role }).map((shape) =>
    shape.kind === 'path' && shape.stroke && !isLimiting ? { ...shape, fill: 'wash' as const } : shape,
  )
  const markX = at + size / 2 + 5
  const value = months.toFixed(1)
  const isLate = markX + size / 2 + 60 > end + 22
  const number = words({
    x: isLate ? at - 9 : markX + size / 2 + 9,
    y: shelf - (isLimiting ? 4 : 5),
    text: value,
    size: isLimiting ? 24 : 17,
    weight: isLimiting ? 750 : 600,
    anchor: isLate ? 'end' : 'start',
    fill: isLimiting ? 'alarm' : 'ink',
  })
  const sentenceX = markX + size / 2 + 69
  const hasSentence = isLimiting && !isNarrow && sentenceX + 262 < end + 22
  return [
    ...moveShapes(mark, markX, shelf + 0.5),
    number,
    ...(hasSentence ? [words({ x: sentenceX, y: shelf - 4, text: 'months, and no further', size: 15 })] : []),
  ]
}

function pastTheEnd(shelf: number, input: CarryInput, { width }: Frame): Shape[] {
  return [
    {
      kind: 'path',
      fill: 'ink',
      steps: [['M', width - 9, shelf - 5], ['L', width, shelf + 1], ['L', width - 9, shelf + 7], ['Z']],
    },
    words({
      x: width - 12,
      y: shelf - 8,
      text: `inside past ${input.endMonths}`,
      size: 14,
      anchor: 'end',
      fill: 'soft',
    }),
  ]
}
