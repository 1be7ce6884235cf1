'use client'

import { useState } from 'react'
import { useOutbox } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import type { Bench } from '@/lib/bench/queries/today'
import { newId } from '@/lib/db/id'
import { handoverKeys } from '@/lib/handover/keys'
import { spokenDay } from '@/lib/study/rules/calendar'

type Props = { notes: Bench['notes']; mayRead: boolean; onChange: () => void }

/** What the shift before left to be known; each stays until somebody says that it is read. */
export function HandoverNotes({ notes, mayRead, onChange }: Props) {
  const { items, send } = useOutbox()
  const [error, setError] = useState<unknown>(null)
  const [reading, setReading] = useState<string | null>(null)
  const open = notes.filter((note) => note.readAt === null)
  if (open.length === 0) return null

  const isWaiting = (id: string) => items.some((item) => item.url === handoverKeys.read(id))

  async function read({ id, text }: (typeof notes)[number]) {
    setReading(id)
    setError(null)
    try {
      await send({
        url: handoverKeys.read(id),
        body: { id: newId() },
        about: {
          kind: 'handover',
          label: 'A note of the shift before is read',
          what: text.slice(0, 80),
          href: '/bench',
        },
      })
      onChange()
    } catch (refused) {
      setError(refused)
    } finally {
      setReading(null)
    }
  }

  return (
    <section aria-label="Notes from the shift before" className="mt-3 px-4 sm:px-5">
      {open.map((note) => (
        <div key={note.id} className="flex items-center gap-3 border-b-2 border-ink py-2">
          <div className="min-w-0 flex-1">
            <p className="whitespace-pre-line text-20">{note.text}</p>
            <p className="text-17 text-soft">
              {note.by}, {spokenDay(note.writtenAt)}
            </p>
          </div>
          {isWaiting(note.id) ? (
            <p className="text-17 font-650">Read, not sent yet</p>
          ) : mayRead ? (
            <Button density="bench" busy={reading === note.id} onClick={() => void read(note)}>
              Read
            </Button>
          ) : null}
        </div>
      ))}
      <ErrorNote error={error} />
    </section>
  )
}
