import { isPassing } from '@/components/bench/outbox'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'

export type EntryKind = 'weighings' | 'steps' | 'fills' | 'readings'

/** An entry at a batch that is still only on this tablet: sent in order, each once, by whoever typed it. */
export type KeptEntry = {
  /** The client-made id of the row itself. */
  id: string
  personId: string
  batchCode: string
  kind: EntryKind
  /** "Squalane, 51.62 g" */
  name: string
  body: Record<string, unknown>
  keptAt: string
  /** Why the server would not take it as it is. */
  refused: string | null
}

const storeKey = 'stillstand.batch-outbox'
const changed = 'stillstand-batch-outbox'
const none: KeptEntry[] = []
let cache: { text: string | null; items: KeptEntry[] } = { text: null, items: none }

export function listKept(): KeptEntry[] {
  const text = localStorage.getItem(storeKey)
  if (text !== cache.text) cache = { text, items: text ? (JSON.parse(text) as KeptEntry[]) : none }
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

function store(items: KeptEntry[]): void {
  localStorage.setItem(storeKey, JSON.stringify(items))
  window.dispatchEvent(new Event(changed))
}

export type NewEntry = Omit<KeptEntry, 'keptAt' | 'refused'>

export function dropKept(id: string): void {
  store(listKept().filter((item) => item.id !== id))
}

/**
 * Sends an entry, or keeps it where the network is away or others wait before it. A refusal is thrown, so that it
 * stands beside what was typed. The row's own id makes a repeat harmless.
 */
export async function sendOrKeep(item: NewEntry): Promise<'sent' | 'kept'> {
  const isBehind = listKept().some((other) => other.batchCode === item.batchCode && other.refused === null)
  if (!isBehind) {
    try {
      await post(item)
      return 'sent'
    } catch (error) {
      if (!(error instanceof ClientError) || !isPassing(error)) throw error
    }
  }
  const others = listKept().filter((other) => other.id !== item.id)
  store([...others, { ...item, keptAt: new Date().toISOString(), refused: null }])
  return 'kept'
}

/** The device's time is set anew at each attempt, because the server corrects by it. */
function post({ batchCode, kind, body }: NewEntry): Promise<unknown> {
  const method = kind === 'weighings' || kind === 'steps' ? 'PUT' : 'POST'
  const url = `/api/batches/${encodeURIComponent(batchCode)}/${kind}`
  return send(url, method, { ...body, deviceNow: new Date().toISOString() }, { key: newId() })
}

let isSending = false

/** Sends what this person kept, oldest first, and stops where the network does. */
export async function sendKept(personId: string): Promise<{ sent: number; isReached: boolean }> {
  if (isSending) return { sent: 0, isReached: true }
  isSending = true
  let sent = 0
  try {
    for (const item of listKept().filter((one) => one.personId === personId && one.refused === null)) {
      try {
        await post(item)
        sent += 1
        dropKept(item.id)
      } catch (error) {
        if (!(error instanceof ClientError) || isPassing(error)) return { sent, isReached: false }
        const refused = error.sentence
        store(listKept().map((one) => (one.id === item.id ? { ...one, refused } : one)))
      }
    }
    return { sent, isReached: true }
  } finally {
    isSending = false
  }
}
