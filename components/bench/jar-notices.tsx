import type { OutboxItem } from '@/components/device/outbox-item'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { dayText } from '@/lib/report/rules'

/** What one should know before typing: an entry that waits on this tablet, or someone else at the same jar. */
export function JarNotices({
  jar,
  kept,
  isOthers,
}: {
  jar: BenchJarPage
  kept: OutboxItem | undefined
  isOthers: boolean
}) {
  const isIn = jar.fields.filter((field) => jar.read.includes(field.attribute)).map((field) => field.label)
  return (
    <>
      {jar.standsInFor ? (
        <p className="mx-4 mt-3 border-l-4 border-ink pl-3 sm:mx-7">
          It takes the place of jar <b>{jar.standsInFor}</b>, which was not read.
        </p>
      ) : null}
      {isIn.length > 0 ? (
        <p className="mx-4 mt-3 border-l-4 border-ink pl-3 sm:mx-7" role="status">
          <b>{isIn.join(', ')}</b> {isIn.length === 1 ? 'is' : 'are'} on record; the rest is asked here.
        </p>
      ) : null}
      {jar.mishaps.map((one) => (
        <p key={one.at} className="mx-4 mt-3 border-l-4 border-ink pl-3 sm:mx-7">
          <b>
            {one.kind === 'missed' ? 'Not read' : `${one.kind.charAt(0).toUpperCase()}${one.kind.slice(1)}`}
          </b>
          : {one.reason} ({one.by}, {dayText(one.at)})
        </p>
      ))}
      {kept ? (
        <p className="mx-4 mt-3 border-l-4 border-ink pl-3 sm:mx-7" role="status">
          {kept.refusal
            ? `The server did not take what was kept here: ${kept.refusal.sentence}`
            : 'What you typed is kept on this tablet and goes out when the network is back.'}
        </p>
      ) : null}
      {jar.openedBy && isOthers ? (
        <p className="mx-4 mt-3 border-l-4 border-ink pl-3 sm:mx-7" role="status">
          <b>{jar.openedBy.name}</b> has this jar open. If you both keep it, both stay on record and you say
          which counts.
        </p>
      ) : null}
    </>
  )
}
