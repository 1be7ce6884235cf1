import { heatWeight } from '@/components/marks/heat'
import type { Bench } from '@/lib/bench/queries/today'
import { percentOf } from '@/lib/science/percent'

/** The next seven working days on one ruler, true to the calendar, with how many jars which station asks for. */
export function WeekLoad({ bench }: { bench: Bench }) {
  const { week } = bench
  const last = week.at(-1)?.day
  if (!last || week.every((one) => one.counts.length === 0)) return null
  const stations = bench.stations.filter((s) =>
    week.some((one) => one.counts.some((count) => count.stationId === s.id)),
  )
  const span = daysBetween(bench.today, last)
  const at = (day: string) => ({ left: `${percentOf(daysBetween(bench.today, day), span)}%` })
  return (
    <section aria-labelledby="week-load" className="mt-6 px-4 sm:px-5">
      <h2 id="week-load" className="text-20 font-650">
        {total(week)} jars on the next seven working days
      </h2>
      <div className="mt-2 flex leading-none" aria-hidden>
        <ol className="w-[6em] shrink-0 pt-12 text-17">
          {stations.map((station) => {
            const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
            return (
              <li
                key={station.id}
                className="flex h-9 items-end whitespace-nowrap pb-1"
                style={{ fontWeight: celsius === null ? 430 : heatWeight(celsius) }}
              >
                {celsius === null ? 'freeze-thaw' : `${String(celsius).replace('-', '\u2212')} °C`}
              </li>
            )
          })}
        </ol>
        <div className="min-w-0 flex-1">
          <div className="relative mx-4">
            {week.map(({ day }) => (
              <p
                key={day}
                className="absolute top-0 -translate-x-1/2 text-center text-16 text-soft"
                style={at(day)}
              >
                {shortWeekday(day).slice(0, 2)}
                <b className="block pt-1.5 font-650">{Number(day.slice(8))}</b>
              </p>
            ))}
          </div>
          <ol className="relative pt-12">
            {stations.map((station) => (
              <li key={station.id} className="h-9 border-b border-ink px-4">
                <div className="relative h-full">
                  {week.map(({ day, counts }) => (
                    <span
                      key={day}
                      className="absolute bottom-0 flex h-full -translate-x-1/2 items-end justify-center pb-1 text-18 font-650"
                      style={at(day)}
                    >
                      {counts.find((one) => one.stationId === station.id)?.count ?? <Tick />}
                    </span>
                  ))}
                </div>
              </li>
            ))}
          </ol>
        </div>
      </div>
      <div className="sr-only">
        <table>
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
      </div>
    </section>
  )
}

/** A day on which the station asks for nothing. */
function Tick() {
  return <span className="mb-[-4px] block h-2 w-px bg-rule" />
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
