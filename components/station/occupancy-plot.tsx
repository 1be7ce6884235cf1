'use client'

import { useWidth } from '@/components/charts/use-width'
import type { OccupancyStep } from '@/lib/station/rules/occupancy'
import { addDays, spokenDay } from '@/lib/study/rules/calendar'

type Props = {
  capacity: number
  steps: OccupancyStep[]
  /** With the study that is being planned. */
  withStudy?: OccupancyStep[]
  height?: number
  /** Several plots of a page reach as far. */
  until?: string
}

const day = 86_400_000
const left = 44

/** Places taken from today on, a stepped line under the line of what the station holds, to scale. */
export function OccupancyPlot({ capacity, steps, withStudy, height = 130, until }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(600)
  const all = [...steps, ...(withStudy ?? [])]
  const first = steps[0]!.on
  const last =
    until ??
    addDays(
      all.reduce((max, one) => (one.on > max ? one.on : max), first),
      7,
    )
  const most = Math.max(capacity, ...all.map((step) => step.taken))
  const floor = height - 22
  const x = (on: string) =>
    left +
    ((width - left) * (Date.parse(on) - Date.parse(first))) /
      Math.max(day, Date.parse(last) - Date.parse(first))
  const y = (taken: number) => 14 + (1 - taken / most) * (floor - 14)
  const line = (own: OccupancyStep[]) =>
    own
      .filter((step) => step.on <= last)
      .map((step, index) => (index === 0 ? `M${left} ${y(step.taken)}` : `H${x(step.on)}V${y(step.taken)}`))
      .join('') + `H${width}`
  const planned = withStudy ? line(withStudy) : null
  const now = (withStudy ?? steps)[0]!.taken
  const isOver = now > capacity
  return (
    <div ref={box} className="min-w-0">
      <svg
        width={width}
        height={height}
        className="block"
        role="img"
        aria-label={spoken(capacity, steps, withStudy)}
      >
        <path d={`${line(steps)}V${floor}H${left}Z`} fill="var(--recess)" />
        {planned ? (
          <path d={planned} fill="none" stroke={isOver ? 'var(--alarm)' : 'var(--ink)'} strokeWidth="2.5" />
        ) : null}
        <path
          d={line(steps)}
          fill="none"
          stroke={planned ? 'var(--soft)' : 'var(--ink)'}
          strokeWidth={planned ? 1.25 : 1.75}
        />
        <path
          d={`M${left} ${y(capacity)}H${width}`}
          stroke="var(--ink)"
          strokeWidth="1"
          strokeDasharray="2 4"
        />
        <path d={`M${left} ${floor}H${width}`} stroke="var(--ink)" strokeWidth="1.5" />
        <text x={left - 6} y={y(capacity) + 4} fontSize={13} textAnchor="end">
          {capacity}
        </text>
        {Math.abs(y(now) - y(capacity)) > 14 ? (
          <text x={left - 6} y={y(now) + 4} fontSize={13} fontWeight={650} textAnchor="end">
            {now}
          </text>
        ) : null}
        <text x={left} y={height - 6} fontSize={13}>
          today
        </text>
        <text x={width} y={height - 6} fontSize={13} textAnchor="end">
          {spokenDay(last)}
        </text>
      </svg>
    </div>
  )
}

function spoken(capacity: number, steps: OccupancyStep[], withStudy: OccupancyStep[] | undefined): string {
  const told = (own: OccupancyStep[]) => `${own[0]!.taken} of ${capacity} places taken`
  const end = steps.at(-1)!
  const later = end === steps[0] ? '' : `, ${end.taken} from ${spokenDay(end.on)} on`
  return withStudy ? `${told(steps)}${later}; with this study ${told(withStudy)}` : `${told(steps)}${later}`
}
