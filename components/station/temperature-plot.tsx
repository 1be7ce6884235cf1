'use client'

import { thinned } from '@/lib/station/rules/thin'
import { useWidth } from '@/components/charts/use-width'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

type Entry = { measuredAt: string; temperatureC: number }
type Props = {
  station: { temperatureC: number | null; lowC: number | null; highC: number | null }
  log: Entry[]
  timeZone: string
}

const height = 170

/** The record as a line between its limits. Thinned to the width, keeping the least and the most of each step. */
export function TemperaturePlot({ station, log, timeZone }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(1360)
  const times = log.map((entry) => Date.parse(entry.measuredAt))
  const [first, last] = [times[0]!, times.at(-1)!]
  const values = [...log.map((entry) => entry.temperatureC), station.lowC, station.highC].filter(
    (value) => value !== null,
  )
  const [min, max] = [Math.min(...values), Math.max(...values)]
  const margin = Math.max(0.5, (max - min) * 0.12)
  const x = (time: number) => 46 + ((width - 60) * (time - first)) / Math.max(1, last - first)
  const y = (celsius: number) => 8 + ((max + margin - celsius) / (max - min + 2 * margin)) * (height - 36)
  const floor = height - 28
  const points = thinned(log, Math.max(60, Math.floor(width / 2))).map(
    (entry) => `${x(Date.parse(entry.measuredAt)).toFixed(1)} ${y(entry.temperatureC).toFixed(1)}`,
  )
  return (
    <div ref={box} className="min-w-0">
      <svg width={width} height={height} className="block" role="img" aria-label={spoken(log, station)}>
        {station.highC === null ? null : (
          <rect x={40} y={8} width={width - 40} height={y(station.highC) - 8} fill="var(--wash)" />
        )}
        {station.lowC === null ? null : (
          <rect
            x={40}
            y={y(station.lowC)}
            width={width - 40}
            height={Math.max(0, floor - y(station.lowC))}
            fill="var(--wash)"
          />
        )}
        {[station.lowC, station.highC].map((limit) =>
          limit === null ? null : (
            <g key={limit}>
              <path d={`M40 ${y(limit)}H${width}`} stroke="var(--alarm)" strokeWidth="1.5" />
              <text x={34} y={y(limit) + 5} fontSize={14} textAnchor="end">
                {String(limit).replace('-', '−')}
              </text>
            </g>
          ),
        )}
        {station.temperatureC === null ? null : (
          <text x={34} y={y(station.temperatureC) + 5} fontSize={14} fontWeight={650} textAnchor="end">
            {String(station.temperatureC).replace('-', '−')}
          </text>
        )}
        <path
          d={`M${points.join('L')}`}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="1.75"
          strokeLinejoin="round"
        />
        <path d={`M40 ${floor}H${width}`} stroke="var(--ink)" strokeWidth="1.5" />
        <text x={46} y={height - 8} fontSize={13}>
          {spokenDay(dayIn(timeZone, log[0]!.measuredAt))}
        </text>
        <text x={width} y={height - 8} fontSize={13} textAnchor="end">
          {spokenDay(dayIn(timeZone, log.at(-1)!.measuredAt))}
        </text>
      </svg>
    </div>
  )
}

function spoken(log: Entry[], station: Props['station']): string {
  const values = log.map((entry) => entry.temperatureC)
  const limits =
    station.lowC === null || station.highC === null ? '' : `, limits ${station.lowC} to ${station.highC} °C`
  return `${log.length} temperatures from ${Math.min(...values)} to ${Math.max(...values)} °C${limits}`
}
