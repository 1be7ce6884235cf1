import { heatWeight } from '@/components/marks/heat'
import type { Bench } from '@/lib/bench/queries/today'

const width = 700
const top = 22

/** The next seven working days on one ruler, true to the calendar, with how many jars which station asks for. */
export function WeekLoad({ bench }: { bench: Bench }) {
  const { week } = bench
  const last = week.at(-1)?.day
  if (!last || week.every((one) => one.counts.length === 0)) return null
  const stations = bench.stations.filter((s) =>
    week.some((one) => one.counts.some((count) => count.stationId === s.id)),
  )
  const span = daysBetween(bench.today, last)
  const x = (day: string) => 120 + ((width - 150) * daysBetween(bench.today, day)) / span
  const height = top + 14 + stations.length * 30
  return (
    <section aria-labelledby="week-load" className="mt-6 px-4 sm:px-5">
      <h2 id="week-load" className="text-20 font-650">
        {total(week)} jars on the next seven working days
      </h2>
      <div className="overflow-x-auto">
        <svg
          viewBox={`0 0 ${width} ${height}`}
          width={width}
          height={height}
          className="min-w-[700px]"
          aria-hidden
        >
          {week.map(({ day }) => (
            <g key={day}>
              <path d={`M${x(day)} ${top}V${height}`} stroke="var(--hair)" strokeWidth="1" />
              <text x={x(day)} y={14} textAnchor="middle" fontSize="15" style={{ fill: 'var(--soft)' }}>
                {shortWeekday(day)}
              </text>
            </g>
          ))}
          {stations.map((station, row) => {
            const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
            const y = top + 26 + row * 30
            return (
              <g key={station.id}>
                <text
                  x="0"
                  y={y - 5}
                  fontSize="17"
                  style={{ fill: 'var(--ink)', fontWeight: celsius === null ? 430 : heatWeight(celsius) }}
                >
                  {celsius === null ? 'freeze-thaw' : `${String(celsius).replace('-', '\u2212')} °C`}
                </text>
                <path d={`M100 ${y}H${width}`} stroke="var(--ink)" strokeWidth="1" />
                {week.map(({ day, counts }) => {
                  const count = counts.find((one) => one.stationId === station.id)?.count ?? 0
                  return count === 0 ? null : (
                    <text
                      key={day}
                      x={x(day)}
                      y={y - 5}
                      textAnchor="middle"
                      fontSize="18"
                      style={{ fill: 'var(--ink)', fontWeight: 650 }}
                    >
                      {count}
                    </text>
                  )
                })}
              </g>
            )
          })}
        </svg>
      </div>
      <table className="sr-only">
        <caption>Jars on the next working days</caption>
        <thead>
          <tr>
            <th>Station</th>
            {week.map(({ day }) => (
              <th key={day}>{shortWeekday(day)}</th>
            ))}
          </tr>
        </thead>
        <tbody>
          {stations.map((station) => (
            <tr key={station.id}>
              <th>{station.name}</th>
              {week.map(({ day, counts }) => (
                <td key={day}>{counts.find((one) => one.stationId === station.id)?.count ?? 0}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  )
}

function total(week: Bench['week']): number {
  return week.flatMap((one) => one.counts).reduce((sum, { count }) => sum + count, 0)
}

function daysBetween(from: string, to: string): number {
  return (Date.parse(to) - Date.parse(from)) / 86_400_000
}

function shortWeekday(day: string): string {
  return new Date(`${day}T12:00:00`).toLocaleDateString('en-GB', { weekday: 'short', day: 'numeric' })
}
