import Link from 'next/link'
import { bandText } from '@/components/bench/verdict'
import { PrintButton } from '@/components/bench/print-button'
import { heatLine } from '@/components/marks/heat'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { StationLabel } from '@/components/ui/station-label'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { Bench, BenchStation } from '@/lib/bench/queries/today'
import type { BenchField } from '@/lib/bench/rules'
import { dayText, shortDay } from '@/lib/report/rules'
import { shownValue } from '@/lib/study/rules/words'

type Props = { bench: Bench; hasBlanks: boolean }

/** The day on paper, in walking order; with blanks it is a form from which the readings are typed in later. */
export function DaySheet({ bench, hasBlanks }: Props) {
  const stations = bench.stations
    .map((station) => ({ ...station, jars: station.jars.filter(isOpen) }))
    .filter((station) => station.jars.length > 0)
  const count = stations.reduce((sum, station) => sum + station.jars.length, 0)
  return (
    <article className="mx-auto max-w-[1000px] px-5 pb-10 pt-4 text-15 print:max-w-none print:p-0">
      <div data-screen-only className="mb-4 flex flex-wrap items-center gap-3">
        <PrintButton />
        <Link
          href={hasBlanks ? '/bench/day-sheet' : '/bench/day-sheet?blanks=yes'}
          className="btn"
          data-density="bench"
        >
          {hasBlanks ? 'Without blanks' : 'With blanks to fill in'}
        </Link>
        <Link href="/bench" className="btn" data-density="bench">
          Back to the walk
        </Link>
      </div>
      <h1 className="text-26 leading-tight">
        <b>{count === 0 ? 'Nothing' : count}</b> {count === 1 ? 'jar' : count === 0 ? 'is' : 'jars'} to read,{' '}
        {dayText(bench.today)}
      </h1>
      {hasBlanks ? (
        <p className="mt-1">
          Write the number as the instrument shows it, the time and your initials. Type it in later as from
          paper, with the time that stands here.
        </p>
      ) : null}
      {stations.map((station) => (
        <StationPart key={station.id} station={station} hasBlanks={hasBlanks} />
      ))}
    </article>
  )
}

function isOpen(jar: BenchJar): boolean {
  return jar.state === 'due' || jar.state === 'resting'
}

function StationPart({ station, hasBlanks }: { station: BenchStation; hasBlanks: boolean }) {
  const celsius = station.kind === 'freeze-thaw' ? null : station.temperatureC
  return (
    <section className="mt-6">
      <h2
        className="flex flex-wrap items-end justify-between gap-x-4 break-after-avoid pb-1"
        style={{ borderBottom: `${heatLine(celsius ?? -10)}px solid var(--ink)` }}
      >
        <StationLabel celsius={celsius} name="freeze thaw" size={36} />
        <span className="text-15">
          {station.name}. <b>{station.caution}</b>
        </span>
      </h2>
      <ul>
        {station.jars.map((jar) => (
          <li
            key={jar.pullJarId}
            className="grid break-inside-avoid grid-cols-[34px_120px_minmax(0,1fr)] items-start gap-x-3 border-b border-rule py-2"
          >
            <JarGlyph height={36} kind={jar.asks === 'watch' ? 'watch' : 'measuring'} state="due" />
            <span>
              <b className="block font-mono text-18 leading-tight">{jar.name}</b>
              {jar.shelf === null ? '' : `shelf ${jar.shelf}, place ${jar.place}`}
            </span>
            <span>
              <span className="flex flex-wrap justify-between gap-x-4">
                <span>
                  <b>
                    {jar.batch.code}, {jar.label}
                  </b>
                  {jar.standsInFor ? `, in place of ${jar.standsInFor}` : ''}
                  {jar.standsAs ? `, ${jar.standsAs}` : ''}
                </span>
                <span>
                  {jar.isOverdue ? `was due by ${shortDay(jar.windowTo)}` : `by ${shortDay(jar.windowTo)}`}
                </span>
              </span>
              {hasBlanks ? <Blanks jar={jar} /> : <Asked jar={jar} />}
            </span>
          </li>
        ))}
      </ul>
    </section>
  )
}

function Asked({ jar }: { jar: BenchJar }) {
  return (
    <span className="flex flex-wrap gap-x-5">
      {jar.fields.map((field) => (
        <span key={field.attribute} className={jar.read.includes(field.attribute) ? 'line-through' : ''}>
          {field.label}: {lastText(field)}
          {field.kind === 'word' ? '' : `, ${bandText(field)}`}
        </span>
      ))}
      {jar.state === 'resting' ? <b>rests</b> : null}
    </span>
  )
}

function Blanks({ jar }: { jar: BenchJar }) {
  const fields = jar.fields.filter((field) => !jar.read.includes(field.attribute))
  const blanks = fields.flatMap((field) => {
    const unit =
      field.kind === 'torque' && field.viscosity
        ? 'torque %'
        : field.kind === 'layers'
          ? 'mm top / below'
          : field.unit
    const isGross = field.attribute === 'mass' && jar.isWeighed
    return Array.from({ length: field.replicates }, (_, i) => ({
      key: `${field.attribute}.${i}`,
      label: isGross
        ? 'Mass with jar, g'
        : `${field.label}${field.replicates > 1 ? ` ${i + 1}` : ''}${unit ? `, ${unit}` : ''}`,
    }))
  })
  return (
    <span className="mt-1 flex flex-wrap gap-x-4 gap-y-2">
      {[...blanks, { key: 'time', label: 'Time' }, { key: 'by', label: 'Initials' }].map((blank) => (
        <span key={blank.key} className="flex items-end gap-1.5 whitespace-nowrap">
          {blank.label}
          <span className="inline-block h-7 w-20 border-b-2 border-ink" />
        </span>
      ))}
    </span>
  )
}

function lastText(field: BenchField): string {
  const [last] = field.last
  if (!last) return 'first reading'
  const value = last.word ?? (last.value === null ? last.typed : shownValue(field, last.value))
  return `${value} on ${shortDay(last.day)}`
}
