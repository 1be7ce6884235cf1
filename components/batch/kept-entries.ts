import { isPassing, makeOutbox, type New, type Waiting } from '@/components/ui/outbox'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'

export type EntryKind = 'weighings' | 'steps' | 'fills' | 'readings'

/** An entry at a batch, under the id of its row. */
export type KeptEntry = Waiting & {
  batchCode: string
  kind: EntryKind
  /** "Squalane, 51.62 g" */
  name: string
}
export type NewEntry = New<KeptEntry>

export const entryOutbox = makeOutbox<KeptEntry>('stillstand.batch-outbox', ({ batchCode, kind }, body) => {
  const method = kind === 'weighings' || kind === 'steps' ? 'PUT' : 'POST'
  return send(`/api/batches/${encodeURIComponent(batchCode)}/${kind}`, method, body, { key: newId() })
})

/**
 * Sends an entry, or keeps it where the network is away or others of its batch wait before it. A refusal is thrown, so
 * that it stands beside what was typed.
 */
export async function sendOrKeep(item: NewEntry): Promise<'sent' | 'kept'> {
  const isBehind = entryOutbox
    .list()
    .some((other) => other.batchCode === item.batchCode && other.refused === null)
  if (!isBehind) {
    try {
      await entryOutbox.attempt(item)
      return 'sent'
    } catch (error) {
      if (!(error instanceof ClientError) || !isPassing(error)) throw error
    }
  }
  entryOutbox.keep(item, (other) => other.id === item.id)
  return 'kept'
}
