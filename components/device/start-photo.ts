'use client'

import { useEffect, useState } from 'react'
import { batchPhotoKeys } from '@/lib/batch/keys'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { photoKeys } from '@/lib/photo/keys'
import { useDevice } from './device-context'
import type { Store } from './store'

type Known = Pick<BenchJarPage, 'batch' | 'startPhoto'>

/** Where the photo is that a jar is looked at beside; null where there is none. */
export function startPhotoAt({ batch, startPhoto }: Known): { preview: string; original: string } | null {
  if (!startPhoto) return null
  const { of, id } = startPhoto
  return of === 'jar'
    ? { preview: photoKeys.preview(id), original: photoKeys.original(id) }
    : { preview: batchPhotoKeys.preview(batch.code, id), original: batchPhotoKeys.original(batch.code, id) }
}

/** The small pictures of the coming days' jars go along, one after the other; those of other jars go. */
export async function keepStartPhotos(store: Store, jars: readonly Known[], personId: string): Promise<void> {
  const addresses = [...new Set(jars.flatMap((jar) => startPhotoAt(jar)?.preview ?? []))]
  for (const address of await store.keepPicturesOf(addresses)) {
    const answer = await fetch(address, { headers: { 'stillstand-person': personId } })
    if (answer.ok)
      await store.keepData(address, { readAt: new Date().toISOString(), data: await answer.blob() })
  }
}

/** A small picture as this device keeps it, else from the server; null while that is looked up. */
export function useKeptPicture(address: string): string | null {
  const device = useDevice()
  const [source, setSource] = useState<string | null>(null)
  useEffect(() => {
    if (!device) return
    let isGone = false
    let made: string | null = null
    void device.store
      .findData(address)
      .catch(() => undefined)
      .then((kept) => {
        if (isGone) return
        if (kept) made = URL.createObjectURL(kept.data as Blob)
        setSource(made ?? address)
      })
    return () => {
      isGone = true
      if (made) URL.revokeObjectURL(made)
    }
  }, [device, address])
  return source
}
