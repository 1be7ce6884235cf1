import { Drawn } from '../marks/drawn'
import { jarShapes, type JarState } from '../marks/jar-shapes'
import { moveShapes } from '../marks/place'
import { halo } from './halo'
import { jarShift, jarStateOf } from './sheet-layout'
import type { SheetCell, SheetMishap } from './sheet-layout'

/** What became of a jar, as its glyph: not read, split, gone, opened, asked for too soon. */
const glyphOf: Record<SheetMishap, JarState> = {
  missed: 'missed',
  broken: 'broken',
  lost: 'missed',
  'wrong jar': 'spent',
  'pulled early': 'due',
}

/** Where another jar of the pull was read, what happened stands small above it; else the place itself tells it. */
function beside({ state, mishaps = [] }: SheetCell): SheetMishap | null {
  const isTold = state === 'missed' || state === 'broken' || state === 'lost'
  return isTold ? null : (mishaps.at(-1) ?? null)
}

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
    bleed: cell.bleed,
    creamPercent: cell.creamPercent,
  })
  const mishap = beside(cell)
  const half = isOut ? glyph * 0.65 : glyph * 0.46
  const frameTop = isOut ? shelf - glyph * 0.8 : jarTop - (cell.posture === 'leaning' ? 12 : 8)
  return (
    <g>
      <Drawn shapes={moveShapes(shapes, x + jarShift(cell, glyph), shelf)} />
      {mishap ? (
        <Drawn
          shapes={moveShapes(jarShapes({ height: 16, state: glyphOf[mishap] }), x + glyph * 0.2, jarTop - 4)}
        />
      ) : null}
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
