'use client'

import { startPhotoAt, useKeptPicture } from '@/components/device/start-photo'
import { useOutbox } from '@/components/device/use-outbox'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { dayText } from '@/lib/report/rules'

/** What is in hand beside how it was; a press opens it large, where there is network. */
export function StartPhoto({ jar }: { jar: BenchJarPage }) {
  const at = startPhotoAt(jar)
  return at && jar.startPhoto ? <Shown at={at} photo={jar.startPhoto} jar={jar} /> : null
}

type ShownProps = {
  at: { preview: string; original: string }
  photo: NonNullable<BenchJarPage['startPhoto']>
  jar: BenchJarPage
}

function Shown({ at, photo, jar }: ShownProps) {
  const { isOnline } = useOutbox()
  const source = useKeptPicture(at.preview)
  const name = photo.label ? `As in ${photo.label}` : 'As at the start'
  const of = photo.of === 'jar' ? `Jar ${jar.code}` : `Batch ${jar.batch.code}`
  const shown = (
    <>
      {source ? (
        // eslint-disable-next-line @next/next/no-img-element -- kept on the device, or served through a permission check
        <img
          src={source}
          alt={`${of}, ${photo.label ?? 'at the start'}`}
          className="h-36 w-[104px] border-2 border-ink object-cover"
        />
      ) : (
        <span className="block h-36 w-[104px]" />
      )}
      <span className="mt-1 block text-17">{name}</span>
      <span className="block text-17 text-soft">{dayText(photo.takenAt)}</span>
    </>
  )
  const className = 'block w-[104px] shrink-0'
  return isOnline ? (
    <a href={at.original} className={className}>
      {shown}
    </a>
  ) : (
    <div className={className}>{shown}</div>
  )
}
