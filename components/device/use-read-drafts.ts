'use client'

import { useCallback, useSyncExternalStore } from 'react'
import { useDevice } from './device-context'
import type { Drafts } from './drafts'

/** What this person is typing, once the device has been read; null until then, when nobody knows what is kept. */
export function useReadDrafts(): Drafts | null {
  const drafts = useDevice()?.drafts ?? null
  const isRead = useSyncExternalStore(
    useCallback((listen: () => void) => drafts?.onChange(listen) ?? (() => undefined), [drafts]),
    () => drafts?.isRead() ?? false,
    () => false,
  )
  return isRead ? drafts : null
}
