'use client'

import { addDays, spokenDay } from '@/lib/study/rules/calendar'
import type { LabCalendar } from '@/lib/study/rules/working-days'
import type { Workload } from '@/lib/study/rules/workload'
import { TimeRuler } from './time-ruler'
import { useWidth } from './use-width'
import { workloadLayout, type Column } from './workload-geometry'

type Props = {
  workload: Workload
  /** The same weeks as they are without the study that is being planned; then columns say before and after. */
  before?: Workload
  calendar: LabCalendar
}

/**
 * Weeks on the house's ruler, each week's jars a column on the shelf. Alone: solid is opened, hollow is watched. With
 * `before`: soft is there already, ink is added. The shelf has a gap on each day on which nobody is there.
 */
export function WorkloadDrawing({ workload, before, calendar }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>(1000)
  const { weeks, today, late } = workload
  const monday = weeks[0]!.monday
  const parts = weeks.map((week, at) =>
    before
      ? { low: before.weeks[at]!.jars, high: week.jars - before.weeks[at]!.jars }
      : { low: week.measuring, high: week.watch },
  )
  const zero = late > 0 ? 74 : 44
  const layout = workloadLayout(workload, parts, calendar, width, zero)
  const todayWeeks = (Date.parse(today) - Date.parse(monday)) / (7 * 86_400_000)
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <TimeRuler
        scale={layout.scale}
        startOn={monday}
        points={weeks.flatMap((_, at) => (at % (width < 600 ? 12 : 4) === 0 ? [at] : []))}
        todayWeeks={todayWeeks}
        width={width}
        caption=""
      />
      <svg
        width={width}
        height={layout.height + 14}
        viewBox={`0 0 ${width} ${layout.height + 14}`}
        className="block"
        aria-hidden
      >
        {layout.steps.map(({ jars, y }) => (
          <g key={jars}>
            <path d={`M${layout.scale.zero} ${y}H${layout.scale.end}`} stroke="var(--hair)" />
            <text x={width} y={y + 4} fontSize={13} textAnchor="end" style={{ fill: 'var(--soft)' }}>
              {jars}
            </text>
          </g>
        ))}
        {layout.columns.map((column) => (
          <Standing key={column.monday} column={column} shelf={layout.shelf} isCompared={Boolean(before)} />
        ))}
        {layout.late ? (
          <g>
            <rect
              {...layout.late}
              y={layout.shelf - layout.late.height}
              fill="none"
              stroke="var(--ink)"
              strokeWidth={1.5}
              strokeDasharray="1.5 3"
            />
            <text
              x={layout.late.x + 10}
              y={layout.shelf - layout.late.height - 7}
              fontSize={15}
              fontWeight={700}
              textAnchor="middle"
            >
              {late}
            </text>
            <text x={layout.late.x + 10} y={layout.shelf + 18} fontSize={13} textAnchor="middle">
              late
            </text>
          </g>
        ) : null}
        {layout.open.map(({ from, to }) => (
          <path
            key={from}
            d={`M${from + 0.5} ${layout.shelf}H${to - 0.5}`}
            stroke="var(--ink)"
            strokeWidth={2.5}
          />
        ))}
        {weeks.map((week, at) =>
          week.holidays.map(({ day }) => (
            <path
              key={day}
              d={crossAt(layout.scale.x(at + dayOf(week.monday, day) / 7 + 1 / 14), layout.shelf + 9)}
              stroke="var(--ink)"
              strokeWidth={1.25}
            />
          )),
        )}
      </svg>
    </div>
  )
}

/** A column with its lid, as jars stand: what lies low in solid or soft, what stands on it hollow or in ink. */
function Standing({ column, shelf, isCompared }: { column: Column; shelf: number; isCompared: boolean }) {
  const { x, width, low, high, jars, isNamed } = column
  if (jars === 0) return null
  const lid = shelf - low - high
  // Years of weeks on a phone leave a column about a pixel: its line then takes no more than the column has.
  const line = Math.min(1.5, width / 2)
  return (
    <g>
      {low > 0 ? (
        <rect
          x={x}
          y={shelf - low}
          width={width}
          height={low}
          fill={isCompared ? 'var(--rule)' : 'var(--ink)'}
        />
      ) : null}
      {high > 0 ? (
        <rect
          x={x + line / 2}
          y={lid + line / 2}
          width={width - line}
          height={Math.max(0.5, high - line / 2)}
          fill={isCompared ? 'var(--ink)' : 'var(--ground)'}
          stroke="var(--ink)"
          strokeWidth={line}
        />
      ) : null}
      <path
        d={`M${x - 1} ${lid - 2.5}h${width + 2}`}
        stroke={isCompared && high === 0 ? 'var(--rule)' : 'var(--ink)'}
        strokeWidth={3}
      />
      {isNamed ? (
        <text x={x + width / 2} y={lid - 9} fontSize={13} fontWeight={600} textAnchor="middle">
          {jars}
        </text>
      ) : null}
    </g>
  )
}

function crossAt(x: number, y: number): string {
  return `M${x - 3} ${y - 3}l6 6M${x + 3} ${y - 3}l-6 6`
}

function dayOf(monday: string, day: string): number {
  return (Date.parse(day) - Date.parse(monday)) / 86_400_000
}

/** "week of 2 Mar" and, where the year turns, its year. */
export function weekName(monday: string, today: string): string {
  const sunday = addDays(monday, 6)
  return `${spokenDay(monday, false)} to ${spokenDay(sunday, sunday.slice(0, 4) !== today.slice(0, 4))}`
}
