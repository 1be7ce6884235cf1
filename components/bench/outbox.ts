import { ClientError, send } from '@/lib/http/fetcher'
import { newId } from '@/lib/db/id'

/** A jar's entry that is still only on this tablet: sent in order, each once, by whoever typed it. */
export type Kept = {
  id: string
  personId: string
  url: string
  body: Record<string, unknown>
  pullJarId: string
  jarName: string
  code: string
  keptAt: string
  /** Why the server would not take it as it is; its jar must be opened again. */
  refused: string | null
}

const storeKey = 'stillstand.outbox'
const changed = 'stillstand-outbox'
const none: Kept[] = []
let cache: { text: string | null; items: Kept[] } = { text: null, items: none }

export function listKept(): Kept[] {
  const text = localStorage.getItem(storeKey)
  if (text !== cache.text) cache = { text, items: text ? (JSON.parse(text) as Kept[]) : none }
  return cache.items
}

export const noKept = () => none

export function onKeptChange(listen: () => void): () => void {
  window.addEventListener(changed, listen)
  window.addEventListener('storage', listen)
  return () => {
    window.removeEventListener(changed, listen)
    window.removeEventListener('storage', listen)
  }
}

function store(items: Kept[]): void {
  localStorage.setItem(storeKey, JSON.stringify(items))
  window.dispatchEvent(new Event(changed))
}

export function keep(item: Omit<Kept, 'id' | 'keptAt' | 'refused'>): void {
  const rest = listKept().filter((k) => k.pullJarId !== item.pullJarId)
  store([...rest, { ...item, id: newId(), keptAt: new Date().toISOString(), refused: null }])
}

export function dropKept(pullJarId: string): void {
  store(listKept().filter((k) => k.pullJarId !== pullJarId))
}

let isSending = false

/**
 * Sends what this person kept, oldest first, and stops where the network does. The readings' own ids make a
 * repeat harmless; the device's time is set anew at each attempt, because the server corrects by it.
 */
export async function sendKept(personId: string): Promise<{ sent: Kept[]; isReached: boolean }> {
  if (isSending) return { sent: [], isReached: true }
  isSending = true
  const sent: Kept[] = []
  try {
    for (const item of listKept().filter((k) => k.personId === personId && k.refused === null)) {
      try {
        await send(item.url, 'POST', { ...item.body, deviceNow: new Date().toISOString() })
        sent.push(item)
        dropKept(item.pullJarId)
      } catch (error) {
        if (!(error instanceof ClientError) || isPassing(error)) return { sent, isReached: false }
        const refused = error.sentence
        store(listKept().map((k) => (k.id === item.id ? { ...k, refused } : k)))
      }
    }
    return { sent, isReached: true }
  } finally {
    isSending = false
  }
}

/** No network, a restart, too many at once, or signed out: the same entry can go out later. */
export function isPassing(error: ClientError): boolean {
  return error.status === 0 || error.status === 401 || error.status === 429 || error.status >= 500
}
