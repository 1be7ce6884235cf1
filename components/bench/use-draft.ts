'use client'

import { useCallback, useEffect, useRef, useState } from 'react'
import { emptyDraft, keepDraft, readDraft, type Draft } from '@/components/bench/draft'

/** A jar's draft, kept in the device at each key, so that a closed tab loses nothing. */
export function useDraft(personId: string, pullJarId: string) {
  const [draft, set] = useState<Draft>(() => emptyDraft(''))
  const isForgotten = useRef(false)

  useEffect(() => {
    const kept = readDraft(personId, pullJarId)
    // Read after the first paint: the server knows no device.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    if (kept) set(kept)
  }, [personId, pullJarId])

  const setDraft = useCallback(
    (change: (draft: Draft) => Draft) =>
      set((before) => {
        const after = change(before)
        if (!isForgotten.current) keepDraft(personId, pullJarId, after)
        return after
      }),
    [personId, pullJarId],
  )

  const forget = useCallback(() => {
    isForgotten.current = true
    keepDraft(personId, pullJarId, null)
  }, [personId, pullJarId])

  return [draft, setDraft, forget] as const
}
