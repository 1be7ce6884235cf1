import { Drawn } from '../marks/drawn'
import { flagShapes } from '../marks/flag-shapes'
import { heatLine } from '../marks/heat'
import { moveShapes } from '../marks/place'
import { halo } from './halo'
import { SheetForecast } from './sheet-forecast'
import { frontGeometry } from './sheet-front'
import type { Segment } from './sheet-front'
import { SheetJar } from './sheet-jar'
import type { PlacedRow, SheetLayout, SheetProps } from './sheet-layout'

export type SheetSelection = { rowId: string; weeks: number }

/** Everything on the sheet that is drawn and not touched: wash, front, today, shelves, jars, flags' poles. */
export function SheetDrawing({
  sheet,
  layout,
  selected,
}: {
  sheet: SheetProps
  layout: SheetLayout
  selected: SheetSelection | null
}) {
  const { scale, right, height, width, rows } = layout
  const today = sheet.todayWeeks
  const isTodayShown = today !== null && today >= 0 && today <= sheet.endWeeks
  const todayX = today === null ? scale.end : scale.x(Math.min(Math.max(today, 0), sheet.endWeeks))
  const front = frontGeometry(
    rows.map(({ row, top, bottom }) => ({ top, bottom, ...frontOf(row, scale.x) })),
    todayX,
    right,
  )
  const lastFront = rows.findLast(({ row }) => frontOf(row, scale.x).x !== null)
  return (
    <svg
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      overflow="visible"
      className="absolute inset-0"
      aria-hidden
    >
      {front.wash.map((box) => (
        <rect key={box.y} x={box.x} y={box.y} width={box.w} height={box.h} fill="var(--wash)" />
      ))}
      <Segments segments={front.solid} width={3} />
      <Segments segments={front.dashed} width={2.5} dash="9 6" />
      {isTodayShown ? <TodayLine x={todayX} rows={rows} weeks={today} /> : null}
      {rows.map((placed) => (
        <Row
          key={placed.row.id}
          placed={placed}
          layout={layout}
          selected={selected}
          startOn={sheet.startOn}
        />
      ))}
      {lastFront ? (
        <text
          x={right}
          y={lastFront.bottom + 19}
          fontSize={13}
          textAnchor="end"
          style={{ fill: 'var(--alarm)', ...halo('var(--ground)') }}
        >
          Beyond this line separation has left its band. Dashed: forecast.
        </text>
      ) : null}
    </svg>
  )
}

function frontOf(
  row: PlacedRow['row'],
  x: (weeks: number) => number,
): { x: number | null; isForecast: boolean } {
  if (typeof row.frontWeeks === 'number') return { x: x(row.frontWeeks), isForecast: false }
  if (typeof row.frontForecastWeeks === 'number') return { x: x(row.frontForecastWeeks), isForecast: true }
  return { x: null, isForecast: false }
}

function Segments({ segments, width, dash }: { segments: Segment[]; width: number; dash?: string }) {
  if (segments.length === 0) return null
  return (
    <path
      d={segments.map(({ x1, y1, x2, y2 }) => `M${x1} ${y1}L${x2} ${y2}`).join('')}
      fill="none"
      stroke="var(--alarm)"
      strokeWidth={width}
      strokeDasharray={dash}
      strokeLinecap={dash ? 'butt' : 'square'}
    />
  )
}

/** Today's line stops short of the jars and numbers that stand on it. */
function TodayLine({ x, rows, weeks }: { x: number; rows: PlacedRow[]; weeks: number }) {
  const parts: string[] = []
  let from = 0
  for (const { row, jarTop, shelf, bottom } of rows) {
    if (!row.cells.some((cell) => Math.abs(cell.weeks - weeks) < 0.5)) continue
    parts.push(`M${x} ${from}V${jarTop - 3}`)
    from = bottom - 2
    if (from < shelf) break
  }
  const last = rows.at(-1)
  if (last && from < last.bottom - 40) parts.push(`M${x} ${from}V${last.shelf}`)
  return <path d={parts.join('')} stroke="var(--ink)" strokeWidth={1.25} />
}

function Row({
  placed,
  layout,
  selected,
  startOn,
}: {
  placed: PlacedRow
  layout: SheetLayout
  selected: SheetSelection | null
  startOn: string
}) {
  const { row, shelf, jarTop, unspentX } = placed
  const { scale, glyph, right } = layout
  const isFreezeThaw = row.kind === 'freeze-thaw'
  const line = isFreezeThaw ? 1.5 : heatLine(row.temperatureC)
  const lastX = scale.x(row.cells.at(-1)?.weeks ?? 0)
  const front = frontOf(row, scale.x)
  const behind = (x: number) => (front.x !== null && x > front.x ? 'var(--wash)' : 'var(--ground)')
  const labelY = shelf + 17 + line
  return (
    <g>
      <path
        d={`M0 ${shelf + line / 2}H${isFreezeThaw ? lastX + 22 : right}`}
        stroke="var(--ink)"
        strokeWidth={line}
        strokeDasharray={isFreezeThaw ? '9 5' : undefined}
      />
      {row.cells.map((cell) => (
        <SheetJar
          key={cell.weeks}
          cell={cell}
          x={scale.x(cell.weeks)}
          shelf={shelf}
          jarTop={jarTop}
          glyph={glyph}
          labelY={labelY}
          behind={behind(scale.x(cell.weeks))}
          isSelected={selected?.rowId === row.id && selected.weeks === cell.weeks}
        />
      ))}
      {placed.flags.map((flag, index) => (
        <Pole key={flag.number} placed={placed} layout={layout} index={index} />
      ))}
      {typeof row.frontForecastWeeks === 'number' && typeof row.frontWeeks !== 'number' ? (
        <SheetForecast
          row={row}
          layout={layout}
          y={shelf + 15}
          startOn={startOn}
          background={behind(right)}
        />
      ) : row.remark ? (
        <text
          x={unspentX}
          y={labelY}
          fontSize={14}
          style={{ fill: 'var(--soft)', ...halo(behind(unspentX)) }}
        >
          {row.remark}
        </text>
      ) : null}
    </g>
  )
}

function Pole({ placed, layout, index }: { placed: PlacedRow; layout: SheetLayout; index: number }) {
  const flag = placed.flags[index]
  if (!flag || flag.weeks === null) return null
  const { scale, glyph } = layout
  const at = flag.weeks
  const cell = placed.row.cells.find((one) => Math.abs(one.weeks - at) < 0.36 && one.state !== 'planned')
  const before = placed.flags.slice(0, index).filter((one) => one.weeks === at).length
  const shift = !cell ? 0 : cell.posture === 'lying' ? glyph * (0.5 - 0.077) : glyph * 0.31
  const x = scale.x(cell?.weeks ?? at) - shift + before * 34
  const top = Math.max(placed.top + 2, placed.jarTop - 26)
  const shapes = flagShapes({
    number: flag.number,
    solid: flag.level === 'out',
    pole: before === 0 ? placed.shelf - top : 0,
  })
  return <Drawn shapes={moveShapes(shapes, x, top)} />
}
