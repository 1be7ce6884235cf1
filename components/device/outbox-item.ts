import { newId } from '@/lib/db/id'
import type { ClientError } from '@/lib/http/fetcher'

/** What an entry is about, for the eye and for what hangs together. */
export type About = {
  kind: 'jar' | 'photo' | 'batch' | 'cycle' | 'temperature' | 'missed' | 'taken out' | 'handover' | 'check'
  /** "Jar 45·K7R2M", "Squalane, 51.62 g" */
  label: string
  /** What was typed, in a line: "pH 5.41, look as the initial". */
  what?: string
  code?: string
  pullJarId?: string
  batchCode?: string
  /** What of one thing must keep its order; without it the jar in its pull. */
  subject?: string
  /** Of a batch: which of its lists. */
  list?: 'weighings' | 'steps' | 'fills' | 'readings'
  /** Where it was typed. */
  href?: string
}

/** Why the server would not take an entry as it is. */
export type Refusal = Pick<ClientError, 'status' | 'code' | 'sentence' | 'fields'> & { detail: unknown }

/** One entry on its way: sent in the order of `place`, once, by whoever typed it. */
export type OutboxItem = {
  place?: number
  /** Made by the device. */
  id: string
  /** The Idempotency-Key of each attempt; a changed entry gets another. */
  key: string
  url: string
  method: 'POST' | 'PUT' | 'PATCH'
  /** Beside a file: the other fields of its form. */
  body: Record<string, unknown>
  file: Blob | null
  /** Beside a photo of a jar, as soon as it is made: to measure on. */
  copy?: Blob
  about: About
  /** What stood in the form, so that it can be taken back there. */
  draft: { key: string; value: unknown } | null
  keptAt: string
  refusal: Refusal | null
}

export type NewItem = Pick<OutboxItem, 'url' | 'body' | 'about'> &
  Partial<Pick<OutboxItem, 'id' | 'method' | 'file' | 'draft'>>

export function newItem(entry: NewItem): OutboxItem {
  return {
    id: newId(),
    key: newId(),
    method: 'POST',
    file: null,
    draft: null,
    keptAt: new Date().toISOString(),
    refusal: null,
    ...entry,
  }
}

/** Files go on their own: a large photo holds no reading up. */
export type Lane = 'entries' | 'files'

export function laneOf(item: Pick<OutboxItem, 'file'>): Lane {
  return item.file ? 'files' : 'entries'
}

/** What must keep its order among itself. */
function subjectOf({ about, id }: Pick<OutboxItem, 'about' | 'id'>): string {
  return about.subject ?? about.pullJarId ?? id
}

/** A refused entry holds back what was typed later of the same thing, and nothing else. */
export function mayGoOut(items: readonly OutboxItem[], item: OutboxItem): boolean {
  const before = items.slice(
    0,
    items.findIndex((one) => one.id === item.id),
  )
  const isHolding = (one: OutboxItem) =>
    one.refusal !== null && one.file === null && subjectOf(one) === subjectOf(item)
  return item.file !== null || !before.some(isHolding)
}

/** The next of its lane that may go out. */
export function nextToSend(items: readonly OutboxItem[], lane: Lane): OutboxItem | null {
  const isNext = (item: OutboxItem) => laneOf(item) === lane && item.refusal === null && mayGoOut(items, item)
  return items.find(isNext) ?? null
}
