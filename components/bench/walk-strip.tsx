import { TinyJar } from '@/components/bench/tiny-jar'
import { heatLine, heatWeight } from '@/components/marks/heat'
import type { Bench, BenchStation } from '@/lib/bench/queries/today'

/** So many jars stand beside each other on a tablet held upright, at this height each. */
const room = [
  { jars: 24, height: 34 },
  { jars: 34, height: 26 },
]

type Props = { bench: Bench; code: string; onOpen: (code: string) => void }

/** The whole day at one glance, with a pointer over the jar that is open; a station is one press away. */
export function WalkStrip({ bench, code, onOpen }: Props) {
  const stations = bench.stations.filter((s) => s.jars.length > 0)
  const all = bench.counts.total
  const { jars: most, height } = room.find(({ jars }) => all <= jars) ?? room.at(-1)!
  // Where they are more, each station shows its share, with the open one among them.
  const share = (count: number) => (all <= most ? count : Math.max(2, Math.floor((count * most) / all)))
  return (
    <nav aria-label="Today’s walk" className="hidden bg-recess px-5 pb-1 pt-2 sm:block">
      <p className="px-2 text-17">
        <b>{bench.counts.done}</b> of {all} jars read
      </p>
      <ol className="flex items-end">
        {stations.map((station) => (
          <li key={station.id} className="min-w-16" style={{ flexGrow: station.jars.length }}>
            <StationShelf {...{ station, code, height, onOpen }} most={share(station.jars.length)} />
          </li>
        ))}
      </ol>
    </nav>
  )
}

type ShelfProps = Omit<Props, 'bench'> & { station: BenchStation; height: number; most: number }

function StationShelf({ station, code, height, most, onOpen }: ShelfProps) {
  const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
  const jars = nearby(station.jars, code, most)
  const next = station.jars.find((jar) => jar.state === 'due') ?? station.jars[0]!
  const name = celsius === null ? 'freeze-thaw' : `${String(celsius).replace('-', '\u2212')} °C`
  return (
    <button
      type="button"
      aria-label={`${station.name}, ${name}: ${station.counts.due + station.counts.resting} of ${station.jars.length} to read`}
      onClick={() => onOpen(next.code)}
      className="flex min-h-16 w-full flex-col justify-end px-2"
    >
      <span
        className="flex w-full items-end justify-start gap-[3px] pt-3"
        style={{ borderBottom: `${heatLine(celsius ?? -10)}px solid var(--ink)` }}
      >
        {jars.map((jar) => (
          <span key={jar.pullJarId} className="relative">
            {jar.code === code ? (
              <svg
                viewBox="0 0 16 9"
                width="16"
                height="9"
                aria-hidden
                className="absolute -top-3 left-1/2 -translate-x-1/2"
              >
                <path d="M0 0H16L8 9Z" fill="currentColor" />
              </svg>
            ) : null}
            <TinyJar standing={jar.standing} layers={jar.layers} state={jar.state} height={height} />
          </span>
        ))}
      </span>
      <span
        className="w-full whitespace-nowrap text-17"
        style={{ fontWeight: celsius === null ? 430 : heatWeight(celsius) }}
      >
        {celsius === null ? 'F/T' : name}
        {station.jars.length > jars.length ? (
          <span className="font-430 text-soft">, {station.jars.length}</span>
        ) : null}
      </span>
    </button>
  )
}

function nearby<J extends { code: string }>(jars: J[], code: string, most: number): J[] {
  const at = Math.max(
    0,
    jars.findIndex((j) => j.code === code),
  )
  const from = Math.max(0, Math.min(at - Math.floor(most / 2), jars.length - most))
  return jars.slice(from, from + most)
}
