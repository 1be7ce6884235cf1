import { photoKeys } from '@/lib/photo/keys'
import type { OutboxItem } from './outbox-item'
import type { Store } from './store'

const patienceMs = 20_000

/**
 * The copy to measure on goes beside its photo in one request. It is made once, as soon as the photo is kept, and lies
 * beside it, so that the service worker, which makes none, sends it too.
 */
export function keepCopies(
  store: Pick<Store, 'keepCopy'>,
  make: (photo: Blob) => Promise<Blob | null> = copyOf,
) {
  const made = new Map<string, Promise<Blob | null>>()
  // One at a time: a photo that is opened takes some fifty megabytes.
  let before: Promise<unknown> = Promise.resolve()

  function madeOf({ id, file, url }: OutboxItem): Promise<Blob | null> {
    if (!file || url !== photoKeys.add) return Promise.resolve(null)
    const known = made.get(id)
    if (known) return known
    const copy = before.then(async () => {
      const made = await Promise.race([make(file), late()])
      // A full device keeps none: the page sends it all the same.
      if (made) await store.keepCopy(id, made).catch(() => undefined)
      return made
    })
    before = copy
    made.set(id, copy)
    return copy
  }

  return {
    /** The entry with its copy, where there is one. */
    async beside(item: OutboxItem): Promise<OutboxItem> {
      const copy = item.copy ?? (await madeOf(item))
      return copy ? { ...item, copy } : item
    },
    forget: (id: string) => void made.delete(id),
  }
}

/** A browser that comes to no end with a picture must not hold the photo back. */
const late = () => new Promise<null>((resolve) => setTimeout(() => resolve(null), patienceMs))

/** Null where the browser cannot read it: the server says what is wrong with it. */
async function copyOf(photo: Blob): Promise<Blob | null> {
  try {
    const { measuringCopy } = await import('@/components/photo/measuring-copy')
    return (await measuringCopy(photo)).blob
  } catch {
    return null
  }
}
