'use client'

import { useSyncExternalStore } from 'react'
import type { Draft } from '@/components/bench/draft'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { AssignedRepeat } from '@/lib/pull/schema'

/** The jar that was kept last on this screen: what it called for, and what taking it back needs. */
export type LastSave = {
  jar: Pick<BenchJarPage, 'pullJarId' | 'code' | 'name'> & { stationName: string }
  readings: string[]
  draft: Draft
  draftKey: string
  /** One attribute of the jar, read by instrument; null where the jar was kept as a whole. */
  part: { key: string; label: string } | null
  /** On the server, or still only on this tablet. */
  isKeptHere: boolean
  repeats: AssignedRepeat[]
  at: number
}

let last: LastSave | null = null
const listeners = new Set<() => void>()

export function setLastSave(save: Omit<LastSave, 'at'> | null): void {
  last = save && { ...save, at: Date.now() }
  for (const listen of listeners) listen()
}

export function useLastSave(): LastSave | null {
  return useSyncExternalStore(
    (listen) => {
      listeners.add(listen)
      return () => void listeners.delete(listen)
    },
    () => last,
    () => null,
  )
}
