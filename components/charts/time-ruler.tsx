import { dayAfter, dayName, rulerDates, rulerNumbers, tagMiddle, timeLabel, unitOf } from './time-scale'
import { weeksPerMonth } from '@/lib/science/months'
import type { TimeScale } from './time-scale'

export const RULER_HEIGHT = 66

export type TimeRulerProps = {
  scale: TimeScale
  startOn: string
  /** The study's time points in weeks; each gets a long tick. */
  points: number[]
  todayWeeks: number | null
  width: number
  /** Where it begins to be seen: what covers its left end is that wide. */
  left?: number
  /** What stands left of zero; the unit where nothing is said. */
  caption?: string
}

/** One ruler true to scale: weeks or months below, days above, today's black tag. Its line lies at y 52. */
export function TimeRuler({ scale, startOn, points, todayWeeks, width, left = 0, caption }: TimeRulerProps) {
  const unit = unitOf(scale.endWeeks)
  const shownToday =
    todayWeeks !== null && todayWeeks >= 0 && todayWeeks <= scale.endWeeks ? todayWeeks : null
  const tagX = shownToday === null ? null : tagMiddle(scale.x(shownToday), left, width)
  // On a study's first day the tag stands where the unit does, which then goes before it or gives way.
  const captionX = Math.min(scale.zero - 22, tagX === null ? Infinity : tagX - 54)
  const step = unit === 'month' ? weeksPerMonth : 1
  const small = Array.from(
    { length: Math.floor(scale.endWeeks / step + 1e-6) + 1 },
    (_, index) => index * step,
  )
  const isDense = scale.x(step) - scale.x(0) < 5
  const isAtEnd = (weeks: number) => scale.x(weeks) + 38 > width
  return (
    <svg
      width={width}
      height={RULER_HEIGHT}
      viewBox={`0 0 ${width} ${RULER_HEIGHT}`}
      overflow="visible"
      className="block"
      aria-hidden
    >
      <path d={`M${scale.zero} 52H${scale.end}`} stroke="var(--ink)" strokeWidth={1.75} />
      {isDense
        ? null
        : small.map((weeks) => (
            <path key={weeks} d={`M${scale.x(weeks)} 52v-5`} stroke="var(--ink)" strokeWidth={1} />
          ))}
      {points.map((weeks) => (
        <path key={weeks} d={`M${scale.x(weeks)} 52v-11`} stroke="var(--ink)" strokeWidth={1.75} />
      ))}
      {rulerNumbers(points, scale, tagX).map((weeks) => (
        <text key={weeks} x={scale.x(weeks)} y={36} fontSize={17} fontWeight={600} textAnchor="middle">
          {timeLabel(weeks, unit)}
        </text>
      ))}
      {rulerDates(points, startOn, scale, tagX).map(({ weeks, text }) => (
        <text
          key={weeks}
          x={isAtEnd(weeks) ? width : scale.x(weeks)}
          y={16}
          fontSize={13}
          textAnchor={isAtEnd(weeks) ? 'end' : 'middle'}
          style={{ fill: 'var(--soft)' }}
        >
          {text}
        </text>
      ))}
      {captionX < 30 ? null : (
        <text x={captionX} y={36} fontSize={15} textAnchor="end" style={{ fill: 'var(--soft)' }}>
          {caption ?? unit}
        </text>
      )}
      {shownToday === null || tagX === null ? null : (
        <TodayTag x={scale.x(shownToday)} middle={tagX} startOn={startOn} weeks={shownToday} unit={unit} />
      )}
    </svg>
  )
}

/** On a study's first and last day the tag steps aside, and its point still stands on the day. */
function TodayTag({
  x,
  middle,
  startOn,
  weeks,
  unit,
}: {
  x: number
  middle: number
  startOn: string
  weeks: number
  unit: 'week' | 'month'
}) {
  return (
    <g>
      <path d={`M${x} 44V${RULER_HEIGHT}`} stroke="var(--ink)" strokeWidth={1.25} />
      <rect x={middle - 47} y={0} width={94} height={46} rx={3} fill="var(--ink)" />
      <path d={`M${x - 6} 45h12l-6 8z`} fill="var(--ink)" />
      <text
        x={middle}
        y={18}
        fontSize={13}
        fontWeight={500}
        textAnchor="middle"
        style={{ fill: 'var(--onink)' }}
      >
        today, {dayName(dayAfter(startOn, weeks))}
      </text>
      <text
        x={middle}
        y={37}
        fontSize={17}
        fontWeight={700}
        textAnchor="middle"
        style={{ fill: 'var(--onink)' }}
      >
        {timeLabel(weeks, unit)}
      </text>
    </g>
  )
}
