import { ClientError } from '@/lib/http/fetcher'

/** What is still only on this device: sent in order, each once, by whoever typed it. */
export type Waiting = {
  /** Made by the device; it makes a repeat harmless. */
  id: string
  personId: string
  body: Record<string, unknown>
  keptAt: string
  /** Why the server would not take it as it is. */
  refused: string | null
}

export type New<Item extends Waiting> = Omit<Item, 'keptAt' | 'refused'>

export type Outbox<Item extends Waiting> = ReturnType<typeof makeOutbox<Item>>

/**
 * Keeps entries under one place of the device's store. `post` sends one; the device's time is set anew in it at each
 * attempt, because the server corrects by it.
 */
export function makeOutbox<Item extends Waiting>(
  place: string,
  post: (item: New<Item>, body: Record<string, unknown>) => Promise<unknown>,
) {
  const changed = `${place} changed`
  const none: Item[] = []
  let cache: { text: string | null; items: Item[] } = { text: null, items: none }
  let isSending = false

  function list(): Item[] {
    const text = localStorage.getItem(place)
    if (text !== cache.text) cache = { text, items: text ? (JSON.parse(text) as Item[]) : none }
    return cache.items
  }

  function store(items: Item[]): void {
    localStorage.setItem(place, JSON.stringify(items))
    window.dispatchEvent(new Event(changed))
  }

  const attempt = (item: New<Item>) => post(item, { ...item.body, deviceNow: new Date().toISOString() })

  return {
    list,
    none: () => none,
    attempt,

    onChange(listen: () => void): () => void {
      window.addEventListener(changed, listen)
      window.addEventListener('storage', listen)
      return () => {
        window.removeEventListener(changed, listen)
        window.removeEventListener('storage', listen)
      }
    },

    /** Put at the end, in place of what it replaces. */
    keep(item: New<Item>, isReplaced: (other: Item) => boolean): void {
      const kept = { ...item, keptAt: new Date().toISOString(), refused: null } as unknown as Item
      store([...list().filter((other) => !isReplaced(other)), kept])
    },

    drop(isDropped: (item: Item) => boolean): void {
      store(list().filter((item) => !isDropped(item)))
    },

    /** Sends what this person kept, oldest first, and stops where the network does. */
    async flush(personId: string): Promise<{ sent: number; isReached: boolean }> {
      if (isSending) return { sent: 0, isReached: true }
      isSending = true
      let sent = 0
      try {
        for (const item of list().filter((one) => one.personId === personId && one.refused === null)) {
          try {
            await attempt(item)
            sent += 1
            store(list().filter((one) => one.id !== item.id))
          } catch (error) {
            if (!(error instanceof ClientError) || isPassing(error)) return { sent, isReached: false }
            const refused = error.sentence
            store(list().map((one) => (one.id === item.id ? { ...one, refused } : one)))
          }
        }
        return { sent, isReached: true }
      } finally {
        isSending = false
      }
    },
  }
}

/** No network, a restart, too many at once, or signed out: the same entry can go out later. */
export function isPassing(error: ClientError): boolean {
  return error.status === 0 || error.status === 401 || error.status === 429 || error.status >= 500
}
