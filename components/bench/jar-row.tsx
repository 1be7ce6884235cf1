import { TinyJar } from '@/components/bench/tiny-jar'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import { spokenDay } from '@/lib/study/rules/calendar'

const asks = { watch: 'look, stays sealed', measuring: 'opened once', repeat: 'repeat on a spare' }

/** One jar of the walk: its glyph, its code as the label says it, where it stands and until when. */
export function JarRow({
  jar,
  isKept,
  onOpen,
  now,
  zone,
}: {
  jar: BenchJar
  isKept: boolean
  onOpen: (code: string) => void
  /** The server's time. */
  now: number
  zone: string
}) {
  const isOpen = !isKept && (jar.state === 'due' || jar.state === 'resting')
  const place = jar.shelf === null ? '' : `shelf ${jar.shelf}, place ${jar.place}`
  return (
    <li>
      <button
        type="button"
        onClick={() => onOpen(jar.code)}
        className={`flex min-h-16 w-full items-center gap-3 rounded px-3 py-2 text-left ${
          jar.openedBy && isOpen
            ? 'border-[2.5px] border-ink bg-typed'
            : isOpen
              ? 'border-2 border-rule bg-paper'
              : 'border-2 border-transparent'
        }`}
      >
        <span className="flex w-11 shrink-0 justify-center" aria-hidden>
          <TinyJar
            standing={jar.standing}
            layers={jar.layers}
            state={isKept ? 'done' : jar.state}
            height={40}
          />
        </span>
        <span className="shrink-0 font-mono text-26 font-700 leading-none sm:text-30">{jar.code}</span>
        <span className="min-w-0 flex-1 leading-snug">
          <span className="flex flex-wrap justify-between gap-x-3">
            <b className="truncate">
              {jar.batch.code}
              {jar.batch.isReference ? ', a reference' : ''}, {jar.label}
            </b>
            <span
              className={jar.isOverdue ? 'font-650 text-alarm' : jar.isLastDay ? 'font-700' : 'text-soft'}
            >
              {windowText(jar, isKept, now, zone)}
            </span>
          </span>
          {jar.standsInFor ? (
            <span className="block font-650">takes the place of {jar.standsInFor}</span>
          ) : null}
          {jar.standsAs ? <span className="block font-650">{jar.standsAs}</span> : null}
          <span className="block text-soft sm:truncate">
            {isOpen && (jar.openedBy || jar.read.length > 0)
              ? openText(jar)
              : jar.state === 'missed'
                ? [jar.missedReason, jar.mishaps.at(-1)?.by].filter(Boolean).join(', ')
                : [asks[jar.asks], place].filter(Boolean).join(', ')}
          </span>
        </span>
        {isOpen ? <Chevron /> : null}
      </button>
    </li>
  )
}

/** "open: MA, pH and mass are in". */
function openText(jar: BenchJar): string {
  const inside = jar.fields.filter((field) => jar.read.includes(field.attribute)).map((field) => field.label)
  const what = inside.length === 0 ? '' : `${inside.join(', ')} ${inside.length === 1 ? 'is' : 'are'} in`
  return `open: ${[jar.openedBy?.initials, what].filter(Boolean).join(', ')}`
}

function windowText(jar: BenchJar, isKept: boolean, now: number, zone: string): string {
  if (isKept) return 'kept on this tablet'
  if (jar.state === 'missed') return 'not read'
  if (jar.state === 'done') return `read${jar.closedBy ? ` by ${jar.closedBy.initials}` : ''}`
  if (jar.state === 'resting') return restText(jar, now, zone)
  if (jar.isOverdue) return `was due by ${spokenDay(jar.windowTo, false)}`
  return jar.isLastDay ? 'today only' : `by ${spokenDay(jar.windowTo, false)}`
}

/** Counts down while it rests; whoever comes early is told when to come back. */
export function restText(jar: BenchJar, now: number, zone: string): string {
  const until = jar.restUntil === null ? now : Date.parse(jar.restUntil)
  if (until <= now) return 'rested, ready'
  const minutes = Math.ceil((until - now) / 60_000)
  const rest = minutes < 60 ? `${minutes} min` : `${Math.floor(minutes / 60)} h ${minutes % 60} min`
  const at = new Date(until).toLocaleTimeString('en-GB', {
    hour: '2-digit',
    minute: '2-digit',
    timeZone: zone,
  })
  return `rests ${rest} more, until ${at}`
}

function Chevron() {
  return (
    <svg viewBox="0 0 14 24" width="14" height="24" aria-hidden className="shrink-0">
      <path d="M2 2 12 12 2 22" fill="none" stroke="currentColor" strokeWidth="3.5" />
    </svg>
  )
}
