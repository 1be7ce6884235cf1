import { Drawn } from '../marks/drawn'
import { heatLine, heatWeight } from '../marks/heat'
import { moveShapes } from '../marks/place'
import { standingShapes } from '../marks/standing-shapes'
import type { PlacedRow, SheetLayout } from './sheet-layout'

/** The stations at the left, which stay while the sheet is moved sideways. */
export function SheetStations({
  layout,
  width,
  isNarrow,
}: {
  layout: SheetLayout
  width: number
  isNarrow: boolean
}) {
  return (
    <svg
      width={width}
      height={layout.height}
      viewBox={`0 0 ${width} ${layout.height}`}
      className="sticky left-0 z-10 block bg-ground"
      aria-hidden
    >
      {layout.rows.map((placed) => (
        <Station
          key={placed.row.id}
          placed={placed}
          width={width}
          isNarrow={isNarrow}
          isSmall={layout.glyph < 52 || isNarrow}
        />
      ))}
    </svg>
  )
}

function Station({
  placed: { row, shelf },
  width,
  isNarrow,
  isSmall,
}: {
  placed: PlacedRow
  width: number
  isNarrow: boolean
  isSmall: boolean
}) {
  const isFreezeThaw = row.kind === 'freeze-thaw'
  const line = isFreezeThaw ? 1.5 : heatLine(row.temperatureC)
  const isAlarm = row.standing === 'leaning' || row.standing === 'out'
  const markX = isNarrow ? width - 18 : 132
  const markSize = isNarrow ? 16 : isSmall ? 26 : 34
  return (
    <g>
      <path
        d={`M0 ${shelf + line / 2}H${width}`}
        stroke="var(--ink)"
        strokeWidth={line}
        strokeDasharray={isFreezeThaw ? '9 5' : undefined}
      />
      {isFreezeThaw ? (
        <FreezeThaw shelf={shelf} isSmall={isSmall} />
      ) : (
        <text
          x={-2}
          y={shelf - (isSmall ? 10 : 14)}
          fontSize={isNarrow ? (row.label.length > 2 ? 24 : 32) : isSmall ? 40 : 50}
          fontWeight={heatWeight(row.temperatureC)}
          letterSpacing={-0.8}
        >
          {row.label}
          <tspan
            fontSize={isNarrow ? 15 : isSmall ? 19 : 24}
            dx={isNarrow ? 2 : 4}
            dy={isNarrow ? -11 : isSmall ? -13 : -17}
            letterSpacing={0}
          >
            °C
          </tspan>
        </text>
      )}
      <Drawn shapes={moveShapes(standingShapes({ standing: row.standing, size: markSize }), markX, shelf)} />
      <text
        x={isNarrow ? width - 6 : markX}
        y={isNarrow ? shelf - 40 : shelf - (isSmall ? 32 : 44)}
        fontSize={isNarrow ? 13 : 15}
        fontWeight={row.standing === 'out' ? 750 : row.standing === 'leaning' ? 650 : 430}
        textAnchor={isNarrow ? 'end' : 'middle'}
        style={{ fill: isAlarm ? 'var(--alarm)' : 'var(--ink)' }}
      >
        {row.standing}
      </text>
      <text x={0} y={shelf + 16 + line} fontSize={13} style={{ fill: 'var(--soft)' }}>
        {isNarrow ? row.note.split(',')[0] : row.note}
      </text>
    </g>
  )
}

function FreezeThaw({ shelf, isSmall }: { shelf: number; isSmall: boolean }) {
  const size = isSmall ? 18 : 23
  return (
    <>
      <text x={-1} y={shelf - size - 12} fontSize={size} fontWeight={220}>
        freeze
      </text>
      <text x={-1} y={shelf - 12} fontSize={size} fontWeight={430}>
        thaw
      </text>
    </>
  )
}
