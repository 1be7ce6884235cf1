import { useCallback } from 'react'
import { useOutbox } from '@/components/ui/use-outbox'
import { entryOutbox, sendOrKeep, type NewEntry } from './kept-entries'

/** What of this batch is kept on this tablet; an entry goes out at once where the server is reached. */
export function useBatchOutbox(personId: string, batchCode: string, onSent: () => Promise<unknown>) {
  const outbox = useOutbox(entryOutbox, personId, onSent)
  const { setOnline } = outbox
  const kept = outbox.kept.filter((item) => item.batchCode === batchCode)
  const waiting = kept.filter((item) => item.refused === null).length

  const keep = useCallback(
    async (item: Omit<NewEntry, 'personId' | 'batchCode'>) => {
      const how = await sendOrKeep({ ...item, personId, batchCode })
      setOnline(how === 'sent')
      if (how === 'sent') await onSent()
    },
    [personId, batchCode, onSent, setOnline],
  )

  return { ...outbox, kept, waiting, keep }
}

export type BatchOutbox = ReturnType<typeof useBatchOutbox>
