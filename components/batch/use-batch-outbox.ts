import { useCallback, useEffect, useState, useSyncExternalStore } from 'react'
import { listKept, noKept, onKeptChange, sendKept, sendOrKeep, type NewEntry } from './outbox'

/** What of this batch is kept on this tablet, and sending by itself when the server is reached again. */
export function useBatchOutbox(personId: string, batchCode: string, onSent: () => Promise<unknown>) {
  const all = useSyncExternalStore(onKeptChange, listKept, noKept)
  const [isOnline, setOnline] = useState(true)
  const kept = all.filter((item) => item.personId === personId && item.batchCode === batchCode)
  const waiting = kept.filter((item) => item.refused === null).length

  const flush = useCallback(async () => {
    const { sent, isReached } = await sendKept(personId)
    setOnline(isReached && navigator.onLine)
    if (sent > 0) await onSent()
  }, [personId, onSent])

  useEffect(() => {
    const up = () => void flush()
    const down = () => setOnline(false)
    window.addEventListener('online', up)
    window.addEventListener('offline', down)
    return () => {
      window.removeEventListener('online', up)
      window.removeEventListener('offline', down)
    }
  }, [flush])

  useEffect(() => {
    if (waiting === 0) return
    const timer = setInterval(() => void flush(), 5_000)
    return () => clearInterval(timer)
  }, [waiting, flush])

  const keep = useCallback(
    async (item: Omit<NewEntry, 'personId' | 'batchCode'>) => {
      const how = await sendOrKeep({ ...item, personId, batchCode })
      setOnline(how === 'sent')
      if (how === 'sent') await onSent()
    },
    [personId, batchCode, onSent],
  )

  return { kept, waiting, isOnline, flush, keep }
}

export type BatchOutbox = ReturnType<typeof useBatchOutbox>
