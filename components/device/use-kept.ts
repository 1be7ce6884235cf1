'use client'

import { useCallback, useMemo, useSyncExternalStore } from 'react'
import { useDevice } from './device-context'

/**
 * What is being typed under a key, kept on the device at each change, so that a closed tab or an empty battery loses
 * nothing. A kept one of an older form gets the new fields' empty values.
 */
export function useKept<T extends object>(key: string, empty: T) {
  const drafts = useDevice()?.drafts ?? null
  const kept = useSyncExternalStore(
    useCallback((listen: () => void) => drafts?.onChange(listen) ?? (() => undefined), [drafts]),
    () => drafts?.find(key),
    () => undefined,
  )
  // The empty draft is made anew at each render; only the place decides.
  // eslint-disable-next-line react-hooks/exhaustive-deps
  const draft = useMemo<T>(() => (kept ? { ...empty, ...kept } : empty), [kept, key])

  const change = useCallback(
    (next: Partial<T> | ((draft: T) => T)) =>
      drafts?.change(key, (before) => {
        const draft = before ? { ...empty, ...before } : empty
        return typeof next === 'function' ? next(draft) : { ...draft, ...next }
      }),
    // As above.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [drafts, key],
  )
  const forget = useCallback(() => drafts?.change(key, () => undefined), [drafts, key])
  return [draft, change, forget] as const
}
