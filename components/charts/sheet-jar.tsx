import { Drawn } from '../marks/drawn'
import { jarShapes } from '../marks/jar-shapes'
import { moveShapes } from '../marks/place'
import { halo } from './halo'
import { jarShift, jarStateOf } from './sheet-layout'
import type { SheetCell } from './sheet-layout'

/** One jar on its shelf with what is written under it, framed when it is picked. */
export function SheetJar({
  cell,
  x,
  shelf,
  jarTop,
  glyph,
  labelY,
  behind,
  isSelected,
}: {
  cell: SheetCell
  x: number
  shelf: number
  jarTop: number
  glyph: number
  labelY: number
  behind: string
  isSelected: boolean
}) {
  const isOut = cell.posture === 'lying'
  const shapes = jarShapes({
    height: glyph,
    state: jarStateOf(cell),
    posture: cell.posture,
    topPercent: cell.topPercent ?? undefined,
    bottomPercent: cell.bottomPercent ?? undefined,
    detectionPercent: cell.detectionPercent ?? undefined,
  })
  const half = isOut ? glyph * 0.65 : glyph * 0.46
  const frameTop = isOut ? shelf - glyph * 0.8 : jarTop - (cell.posture === 'leaning' ? 12 : 8)
  return (
    <g>
      <Drawn shapes={moveShapes(shapes, x + jarShift(cell, glyph), shelf)} />
      {cell.label ? (
        <text
          x={x}
          y={labelY}
          fontSize={14}
          fontWeight={isOut ? 750 : 430}
          textAnchor="middle"
          style={{ fill: isOut ? 'var(--alarm)' : 'var(--ink)', ...halo(behind) }}
        >
          {cell.label}
        </text>
      ) : null}
      {isSelected ? (
        <rect
          x={x - half + (isOut ? 3 : 0)}
          y={frameTop}
          width={half * 2}
          height={labelY + 6 - frameTop}
          rx={4}
          fill="none"
          stroke="var(--ink)"
          strokeWidth={2.5}
        />
      ) : null}
    </g>
  )
}
