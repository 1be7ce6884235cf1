'use client'

import { useCallback, useMemo } from 'react'
import { sentenceOf } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import type { About, OutboxItem } from './outbox-item'
import { useOutbox } from './use-outbox'

export type PhotoOnItsWay = {
  id: string
  file: Blob | null
  /** Null where it waits. */
  percent: number | null
  /** Why it was not taken. */
  refused: string | null
  drop: () => void
}

type Where = {
  url: string
  fields: Record<string, string>
  about: Omit<About, 'kind'>
  onSent: () => unknown
}

/**
 * Photos of one jar or batch: each is kept on the device as soon as it is taken and goes out in the background. `isMine`
 * says which of the waiting ones belong here.
 */
export function usePhotos({ url, fields, about, onSent }: Where) {
  const isMine = (item: OutboxItem) =>
    item.about.kind === 'photo' &&
    item.about.pullJarId === about.pullJarId &&
    item.about.batchCode === about.batchCode
  const { items, sending, send, drop } = useOutbox((item) => (isMine(item) ? onSent() : undefined))

  const onTheirWay = useMemo(
    () =>
      items.filter(isMine).map((item): PhotoOnItsWay => ({
        ...{ id: item.id, file: item.file, percent: sending[item.id] ?? null },
        ...{ refused: item.refusal?.sentence ?? null, drop: () => void drop(item) },
      })),
    // isMine is made anew at each render from these two.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [items, sending, drop, about.pullJarId, about.batchCode],
  )

  /** `more` goes beside the file: a note, lines drawn on it. */
  const add = useCallback(
    async (file: Blob, more: Record<string, string> = {}, id = newId()) => {
      const claimedAt = new Date().toISOString()
      try {
        return await send<{ id: string }>({
          ...{ id, url, file },
          body: { ...fields, ...more, id, claimedAt, deviceNow: claimedAt },
          about: { ...about, kind: 'photo' },
        })
      } catch (thrown) {
        // The device has no room for it and the server was not reached: nobody has the photo.
        toast(`${about.label} was not kept. ${sentenceOf(thrown).sentence}`, { isAlarm: true })
        return null
      }
    },
    [send, url, fields, about],
  )
  return { add, onTheirWay }
}
