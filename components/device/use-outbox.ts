'use client'

import { useCallback, useEffect, useRef, useSyncExternalStore } from 'react'
import { useDevice } from './device-context'
import { emptyOutbox } from './outbox'
import type { NewItem, OutboxItem } from './outbox-item'
import type { Outcome } from './waiting'

/**
 * What this person keeps on this device, and the one way to send from it. `onSent` hears of each entry that has
 * arrived, also of those that waited.
 */
export function useOutbox(onSent?: (item: OutboxItem) => unknown) {
  const outbox = useDevice()?.outbox ?? null
  const state = useSyncExternalStore(
    useCallback((listen: () => void) => outbox?.onChange(listen) ?? (() => undefined), [outbox]),
    () => outbox?.state() ?? emptyOutbox,
    () => emptyOutbox,
  )
  const hear = useRef(onSent)
  useEffect(() => {
    hear.current = onSent
  })
  useEffect(() => outbox?.onSent((item) => void hear.current?.(item)), [outbox])

  const send = useCallback(
    async <T>(entry: NewItem, replaces?: (item: OutboxItem) => boolean): Promise<Outcome<T>> => {
      if (!outbox) throw new Error('The outbox belongs to a person: send from a page of the notebook.')
      return outbox.send<T>(entry, replaces)
    },
    [outbox],
  )
  const items = state.items.filter((item) => !state.awaited.includes(item.id))
  return {
    ...state,
    /** The oldest first. */
    items,
    waiting: items.filter((item) => item.refusal === null).length,
    send,
    flush: useCallback(() => outbox?.flush(), [outbox]),
    sendAgain: useCallback(
      (item: OutboxItem, change?: Partial<Pick<OutboxItem, 'body' | 'url'>>) =>
        outbox?.sendAgain(item, change),
      [outbox],
    ),
    drop: useCallback((item: OutboxItem) => outbox?.drop(item), [outbox]),
  }
}

export type OutboxOnScreen = ReturnType<typeof useOutbox>
