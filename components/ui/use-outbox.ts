'use client'

import { useCallback, useEffect, useState, useSyncExternalStore } from 'react'
import type { Outbox, Waiting } from './outbox'

/** What this person keeps on this device, whether the server is reached, and sending by itself when it is again. */
export function useOutbox<Item extends Waiting>(
  outbox: Outbox<Item>,
  personId: string,
  onSent: () => unknown,
) {
  const all = useSyncExternalStore(outbox.onChange, outbox.list, outbox.none)
  const [isOnline, setOnline] = useState(true)
  const kept = all.filter((item) => item.personId === personId)
  const waiting = kept.filter((item) => item.refused === null).length

  const flush = useCallback(async () => {
    const { sent, isReached } = await outbox.flush(personId)
    setOnline(isReached && navigator.onLine)
    if (sent > 0) await onSent()
  }, [outbox, personId, onSent])

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

  return { kept, waiting, isOnline, setOnline, flush }
}
