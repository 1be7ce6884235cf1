'use client'

import { useEffect, useState } from 'react'

/** The server's time as it was answered, moved on by what has passed since on this device. */
export function useServerClock(answered: string | undefined): string | null {
  const [ticked, setTicked] = useState<{ answered: string; elapsedMs: number } | null>(null)
  useEffect(() => {
    if (!answered) return
    const since = Date.now()
    const tick = setInterval(() => setTicked({ answered, elapsedMs: Date.now() - since }), 15_000)
    return () => clearInterval(tick)
  }, [answered])
  if (!answered) return null
  const elapsedMs = ticked?.answered === answered ? ticked.elapsedMs : 0
  return new Date(Date.parse(answered) + elapsedMs).toISOString()
}
