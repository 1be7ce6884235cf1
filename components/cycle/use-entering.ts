'use client'

import { useState } from 'react'
import { ClientError } from '@/lib/http/fetcher'

/** One entry of a dialog: sent once, asked about where the server asks, and left as it was typed where it is refused. */
export function useEntering(onDone: () => void) {
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const refused = error instanceof ClientError ? error : null

  async function run(enter: () => Promise<void>): Promise<void> {
    setBusy(true)
    setError(null)
    try {
      await enter()
      onDone()
    } catch (thrown) {
      setError(thrown)
      setBusy(false)
    }
  }

  return {
    run,
    error,
    isBusy,
    fields: refused?.fields ?? {},
    /** What was asked about is what was typed: another value is asked about anew. */
    isAsked: refused?.code === 'confirm',
    forget: () => setError(null),
  }
}
