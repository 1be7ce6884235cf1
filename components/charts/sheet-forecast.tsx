import { halo } from './halo'
import type { SheetLayout, SheetRow } from './sheet-layout'
import { dayAfter, dayName } from './time-scale'

/** When a row is expected to leave its band: the day as a dot, its limits as a bar with their dates. */
export function SheetForecast({
  row,
  layout,
  y,
  startOn,
  background,
}: {
  row: SheetRow
  layout: SheetLayout
  y: number
  startOn: string
  background: string
}) {
  const { scale, right } = layout
  const at = row.frontForecastWeeks
  if (typeof at !== 'number') return null
  const low = row.leavesLow ?? at
  const high = row.leavesHigh ?? at
  const x1 = scale.x(low)
  const isOpen = scale.x(high) > right - 60
  const x2 = isOpen ? right : scale.x(high)
  return (
    <g>
      {x2 > x1 ? (
        <path
          d={`M${x1} ${y}H${x2}`}
          stroke="var(--alarm)"
          strokeWidth={4}
          strokeDasharray={isOpen ? '9 6' : undefined}
        />
      ) : null}
      <path
        d={`M${x1} ${y - 7}v14${isOpen ? '' : `M${x2} ${y - 7}v14`}`}
        stroke="var(--alarm)"
        strokeWidth={2}
      />
      <circle cx={scale.x(at)} cy={y} r={6} fill="var(--alarm)" />
      <text x={x1 - 8} y={y + 5} fontSize={13} textAnchor="end" style={halo('var(--ground)')}>
        {dayName(dayAfter(startOn, low))}
      </text>
      {isOpen ? null : (
        <text x={x2 + 8} y={y + 5} fontSize={13} style={halo(background)}>
          {dayName(dayAfter(startOn, high))}
        </text>
      )}
    </g>
  )
}
