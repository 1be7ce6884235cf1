import Link from 'next/link'
import type { DayJar, DayReading } from '@/lib/day/queries/day'
import { attributeName, attributes, type Attribute } from '@/lib/reading/schema/attributes'
import { listed, shownWithUnit } from '@/lib/study/rules/words'

type Props = { jar: DayJar; readings: DayReading[]; isLate: (id: string) => boolean }

/** A jar's entries of the day, as they were typed; what was corrected or voided stays, struck through. */
export function DayJarPart({ jar, readings, isLate }: Props) {
  const gone = new Set(readings.flatMap((one) => (one.supersedesId ? [one.supersedesId] : [])))
  return (
    <div className="grid gap-x-6 border-b border-hair py-2 sm:grid-cols-[230px_minmax(0,1fr)]">
      <div>
        <Link href={`/bench/${jar.code}`} className="font-mono text-17 font-700 underline underline-offset-4">
          {jar.code}
        </Link>{' '}
        <Link href={`/studies/${jar.studyCode}`} className="underline underline-offset-4">
          {jar.studyCode}
        </Link>
        <p className="text-soft">
          {jar.batchCode}, {jar.label},{' '}
          {jar.isFreezeThaw || jar.temperatureC === null
            ? 'freeze-thaw'
            : `${String(jar.temperatureC).replace('-', '\u2212')} °C`}
        </p>
        {jar.leftOut.length > 0 ? <p>left out: {listed(jar.leftOut.map(attributeName))}</p> : null}
        {jar.note ? <p className="whitespace-pre-line">{jar.note}</p> : null}
      </div>
      <ul>
        {readings.map((one) => (
          <li key={one.id} className="flex flex-wrap gap-x-3 py-0.5">
            <span className={gone.has(one.id) ? 'text-soft line-through' : ''}>
              <b>
                {attributeName(one.attribute)}
                {one.replicate > 1 ? ` ${one.replicate}` : ''}
              </b>{' '}
              {one.isVoid ? 'void' : entered(one)}
            </span>
            <span className="text-soft">
              {one.by}, {time(one.recordedAt)}
              {one.isFromPaper ? `, from paper: measured ${time(one.measuredAt)}` : ''}
            </span>
            {one.reason ? <span>because {one.reason}</span> : null}
            {isLate(one.id) ? <b>after the review</b> : null}
            {one.doubts.map((doubt) => (
              <span key={doubt.sentence} className="w-full text-alarm">
                Doubt: {doubt.sentence}
              </span>
            ))}
          </li>
        ))}
      </ul>
    </div>
  )
}

/** What was typed, and what it came to where that is another number: a torque, a jar's mass. */
function entered({ attribute, value, typed }: DayReading): string {
  const known = (attributes as Record<string, Attribute>)[attribute]
  if (!known || known.words || value === null) return typed
  const shown = shownWithUnit(known, value)
  return Number(typed.replace(',', '.')) === value ? shown : `${shown}, typed ${typed}`
}

function time(at: string): string {
  return new Date(at).toLocaleString('en-GB', {
    day: 'numeric',
    month: 'short',
    hour: '2-digit',
    minute: '2-digit',
  })
}
