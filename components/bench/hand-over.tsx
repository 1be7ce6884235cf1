'use client'

import Link from 'next/link'
import { useState } from 'react'
import { restText } from '@/components/bench/jar-row'
import { useKept } from '@/components/device/use-kept'
import { useOutbox } from '@/components/device/use-outbox'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import type { Bench } from '@/lib/bench/queries/today'
import { newId } from '@/lib/db/id'
import { handoverKeys } from '@/lib/handover/keys'

type Props = { bench: Bench; now: number; onChange: () => void }

/** The end of a shift: what is unfinished, what the next one must know, and the day on paper. */
export function HandOver({ bench, now, onChange }: Props) {
  const [isOpen, setOpen] = useState(false)
  return (
    <div className="mt-6 flex flex-wrap items-center gap-x-6 gap-y-3 px-4 sm:px-5">
      <Button density="bench" onClick={() => setOpen(true)}>
        Hand over
      </Button>
      <Link href="/bench/day-sheet" className="flex min-h-16 items-center underline underline-offset-4">
        Day sheet to print
      </Link>
      <Link
        href="/bench/day-sheet?blanks=yes"
        className="flex min-h-16 items-center underline underline-offset-4"
      >
        Paper form
      </Link>
      {isOpen ? (
        <HandOverDialog bench={bench} now={now} onChange={onChange} onClose={() => setOpen(false)} />
      ) : null}
    </div>
  )
}

function HandOverDialog({ bench, now, onChange, onClose }: Props & { onClose: () => void }) {
  const { send } = useOutbox()
  const [draft, setDraft, forget] = useKept('handover', { text: '' })
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const jars = bench.stations.flatMap((station) => station.jars)
  const unfinished = jars.filter((jar) => jar.state === 'resting' || jar.read.length > 0)
  const left = jars.filter((jar) => jar.state === 'due' && jar.read.length === 0)

  async function write() {
    setBusy(true)
    setError(null)
    const now = new Date().toISOString()
    try {
      const { how } = await send({
        url: handoverKeys.all,
        body: { id: newId(), text: draft.text, claimedAt: now, deviceNow: now },
        about: {
          kind: 'handover',
          label: 'Note for the next shift',
          what: draft.text.slice(0, 80),
          href: '/bench',
        },
      })
      forget()
      toast(how === 'sent' ? 'The note stands on the Bench.' : 'The note is kept on this tablet.', {
        density: 'bench',
      })
      onChange()
      onClose()
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Handing over"
      sentence={`${left.length} still to read today${unfinished.length > 0 ? `, ${unfinished.length} begun:` : ', none is begun.'}`}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Later
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={isBusy}
            why={draft.text.trim() === '' ? 'Write what the next shift must know.' : undefined}
            onClick={write}
          >
            Leave the note
          </Button>
        </>
      }
    >
      {unfinished.length > 0 ? (
        <ul>
          {unfinished.map((jar) => (
            <li
              key={jar.pullJarId}
              className="flex flex-wrap justify-between gap-x-4 border-b border-hair py-2"
            >
              <b className="font-mono text-20">{jar.name}</b>
              <span className="text-17">{unfinishedText(jar, now, bench.zone)}</span>
            </li>
          ))}
        </ul>
      ) : null}
      <TextArea
        label="For the next shift"
        density="bench"
        rows={4}
        value={draft.text}
        onText={(text) => setDraft({ text })}
        hint="It stands on the Bench until somebody presses Read."
      />
      <ErrorNote error={error} />
    </Dialog>
  )
}

function unfinishedText(jar: BenchJar, now: number, zone: string): string {
  const who = jar.openedBy ? `, ${jar.openedBy.initials}` : ''
  if (jar.read.length > 0) return `${readText(jar)} on record, the rest open${who}`
  return `${restText(jar, now, zone)}${who}`
}

function readText(jar: BenchJar): string {
  return jar.fields
    .filter((field) => jar.read.includes(field.attribute))
    .map((field) => field.label)
    .join(', ')
}
