import { Figure } from '../marks/figure'
import { heatLine } from '../marks/heat'
import { jarShapes } from '../marks/jar-shapes'
import { moveShapes } from '../marks/place'
import type { Shape } from '../marks/shape'
import { jarShift, jarStateOf } from './sheet-layout'
import type { SheetCell } from './sheet-layout'

export type ShelfMiniProps = {
  temperatureC: number
  isFreezeThaw?: boolean
  endWeeks: number
  todayWeeks: number | null
  cells: SheetCell[]
  width?: number
  title?: string
}

const JAR = 18
const MARGIN = 9

/** A study's worst shelf in a ledger row, to its own time: a line as far as today, a hairline after. */
export function ShelfMini({ width = 346, title, ...shelf }: ShelfMiniProps) {
  return (
    <Figure
      shapes={shelfMiniShapes(shelf, width)}
      view={{ x: 0, y: -(JAR + 3), width, height: JAR + 8 }}
      title={title}
    />
  )
}

export function shelfMiniShapes(
  { temperatureC, isFreezeThaw, endWeeks, todayWeeks, cells }: Omit<ShelfMiniProps, 'width' | 'title'>,
  width: number,
): Shape[] {
  const x = (weeks: number) => 12 + (weeks / (endWeeks || 1)) * (width - 12 - MARGIN)
  const line = isFreezeThaw ? 1.25 : Math.min(4, heatLine(temperatureC) * 0.75)
  const done = todayWeeks === null ? 0 : Math.min(width, x(Math.max(0, todayWeeks)) + MARGIN)
  return [
    ...(done > 0
      ? [
          {
            kind: 'line',
            x1: 0,
            x2: done,
            y1: line / 2,
            y2: line / 2,
            stroke: 'ink',
            width: line,
          } satisfies Shape,
        ]
      : []),
    ...(done < width
      ? [{ kind: 'line', x1: done, x2: width, y1: 0.75, y2: 0.75, stroke: 'rule', width: 1 } satisfies Shape]
      : []),
    ...placed(cells, x).flatMap((cell) =>
      moveShapes(
        jarShapes({
          height: JAR,
          state: jarStateOf(cell),
          posture: cell.posture,
          topPercent: cell.topPercent ?? undefined,
          bottomPercent: cell.bottomPercent ?? undefined,
          detectionPercent: cell.detectionPercent ?? undefined,
        }),
        x(cell.weeks) + jarShift(cell, JAR),
        0,
      ),
    ),
  ]
}

/** Where time points lie closer than jars are wide, the later of the two is what matters. */
function placed(cells: SheetCell[], x: (weeks: number) => number): SheetCell[] {
  return cells.filter((cell, index) => {
    const next = cells[index + 1]
    return !next || x(next.weeks) - x(cell.weeks) >= 7
  })
}
