'use client'

import { useEffect, useMemo, type ReactNode } from 'react'
import type { PhotoOnItsWay } from './use-photos'

/** Photos that are still only on this device, each with how far it is or why it was not taken. */
export function PhotosOnTheirWay({
  photos,
  act,
}: {
  photos: readonly PhotoOnItsWay[]
  /** What can be done with one before it has gone out. */
  act?: (photo: PhotoOnItsWay) => ReactNode
}) {
  if (photos.length === 0) return null
  return (
    <ul className="mt-3 flex flex-wrap gap-4" data-screen-only>
      {photos.map((photo) => (
        <li key={photo.id} className="max-w-[240px] border-x-2 border-b-2 border-ink px-1 pb-1">
          <Picture file={photo.file} />
          <p role="status" className={photo.refused ? 'text-alarm' : 'text-soft'}>
            {photo.refused ??
              (photo.percent === null ? 'waits on this tablet' : `sending, ${photo.percent} %`)}
          </p>
          {act?.(photo)}
          {photo.refused ? (
            <button type="button" className="min-h-[var(--hit)] underline" onClick={photo.drop}>
              Put it away
            </button>
          ) : null}
        </li>
      ))}
    </ul>
  )
}

function Picture({ file }: { file: Blob | null }) {
  const address = useMemo(() => (file ? URL.createObjectURL(file) : null), [file])
  useEffect(() => () => void (address && URL.revokeObjectURL(address)), [address])
  if (!address) return null
  // eslint-disable-next-line @next/next/no-img-element -- it is in memory, nothing is fetched
  return <img src={address} alt="Photo on its way" className="h-24 w-auto" />
}
