import { TinyJar } from '@/components/bench/tiny-jar'
import { heatLine, heatWeight } from '@/components/marks/heat'
import type { Bench } from '@/lib/bench/queries/today'

/** The whole day in one line, with a pointer over the jar that is open. */
export function WalkStrip({ bench, code }: { bench: Bench; code: string }) {
  const stations = bench.stations.filter((s) => s.jars.length > 0)
  return (
    <nav
      aria-label="Today’s walk"
      tabIndex={0}
      className="hidden overflow-x-auto bg-recess px-7 py-2 sm:block"
    >
      <p className="text-17">
        <b>{bench.counts.done}</b> of {bench.counts.total} jars read
      </p>
      <ol className="mt-1 flex items-end gap-6" aria-hidden>
        {stations.map((station) => {
          const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
          const jars = nearby(station.jars, code)
          return (
            <li key={station.id} className="shrink-0">
              <div
                className="flex items-end gap-1.5 pt-3"
                style={{ borderBottom: `${heatLine(celsius ?? -10)}px solid var(--ink)` }}
              >
                {jars.map((jar) => (
                  <span key={jar.pullJarId} className="relative">
                    {jar.code === code ? (
                      <svg
                        viewBox="0 0 16 9"
                        width="16"
                        height="9"
                        className="absolute -top-3 left-1/2 -translate-x-1/2"
                      >
                        <path d="M0 0H16L8 9Z" fill="currentColor" />
                      </svg>
                    ) : null}
                    <TinyJar standing={jar.standing} layers={jar.layers} state={jar.state} height={34} />
                  </span>
                ))}
                {station.jars.length > jars.length ? (
                  <span className="pb-1 pl-1 text-14">{station.jars.length}</span>
                ) : null}
              </div>
              <p
                className="mt-1 text-center text-17"
                style={{ fontWeight: celsius === null ? 430 : heatWeight(celsius) }}
              >
                {celsius === null ? 'freeze-thaw' : `${String(celsius).replace('-', '\u2212')} °C`}
              </p>
            </li>
          )
        })}
      </ol>
    </nav>
  )
}

/** At most seven jars of a station, the open one among them. */
function nearby<J extends { code: string }>(jars: J[], code: string): J[] {
  const at = Math.max(
    0,
    jars.findIndex((j) => j.code === code),
  )
  const from = Math.max(0, Math.min(at - 3, jars.length - 7))
  return jars.slice(from, from + 7)
}
