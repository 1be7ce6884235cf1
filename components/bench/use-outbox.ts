'use client'

import { useCallback, useEffect, useState, useSyncExternalStore } from 'react'
import { listKept, noKept, onKeptChange, sendKept } from '@/components/bench/outbox'

/** What is kept on this tablet, whether the server is reached, and sending by itself when it is again. */
export function useOutbox(personId: string, onSent: () => void) {
  const all = useSyncExternalStore(onKeptChange, listKept, noKept)
  const [isOnline, setOnline] = useState(true)
  const kept = all.filter((k) => k.personId === personId)
  const waiting = kept.filter((k) => k.refused === null).length

  const flush = useCallback(async () => {
    const { sent, isReached } = await sendKept(personId)
    setOnline(isReached && navigator.onLine)
    if (sent.length > 0) onSent()
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

  return { kept, waiting, isOnline, setOnline, flush }
}
