import { useCallback, useMemo } from 'react'
import type { About, OutboxItem } from '@/components/device/outbox-item'
import { useOutbox } from '@/components/device/use-outbox'

/** An entry at a batch, under the id of its row. */
export type NewEntry = {
  id: string
  kind: NonNullable<About['list']>
  /** "Squalane, 51.62 g" */
  name: string
  body: Record<string, unknown>
}

/** What of this batch is kept on this tablet; an entry goes out at once where the server is reached. */
export function useBatchOutbox(batchCode: string, onSent: () => Promise<unknown>) {
  const outbox = useOutbox((item) => (item.about.batchCode === batchCode ? onSent() : undefined))
  const kept = useMemo(
    () => outbox.items.filter((item) => item.about.batchCode === batchCode),
    [outbox.items, batchCode],
  )
  const { send } = outbox

  const keep = useCallback(
    async ({ id, kind, name, body }: NewEntry) => {
      const outcome = await send(
        {
          url: `/api/batches/${encodeURIComponent(batchCode)}/${kind}`,
          method: kind === 'weighings' || kind === 'steps' ? 'PUT' : 'POST',
          body,
          about: {
            ...{ kind: 'batch', label: name, batchCode, list: kind, subject: subjectOf(id, body) },
            href: `/batches/${encodeURIComponent(batchCode)}`,
          },
        },
        (other) => other.about.kind === 'batch' && other.body['id'] === id,
      )
      if (outcome.how === 'sent') await onSent()
    },
    [send, batchCode, onSent],
  )

  return { ...outbox, kept, waiting: kept.filter((item) => item.refusal === null).length, keep }
}

/** Entries of one line or step count each other's versions on. */
function subjectOf(id: string, body: OutboxItem['body']): string {
  return String(body['weighingId'] ?? body['stepId'] ?? id)
}

export type BatchOutbox = ReturnType<typeof useBatchOutbox>
