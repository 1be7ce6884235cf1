import type { OutboxItem } from '@/components/device/outbox-item'
import type { BenchJarPage } from '@/lib/bench/queries/jar'

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
  return (
    <>
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
