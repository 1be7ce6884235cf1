'use client'

import { useState } from 'react'
import { EarlyAct, MissedFollows } from '@/components/bench/missed-follows'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { ReadingPhoto } from '@/components/photo/reading-photo'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { attributeName } from '@/lib/reading/schema/attributes'
import { readingKeys } from '@/lib/reading/schema/change'
import { dayText } from '@/lib/report/rules'
import { writtenAs } from '@/lib/bench/rules'
import { shownWithUnit } from '@/lib/study/rules/words'

type Props = {
  jar: BenchJarPage
  mayLog: boolean
  onChange: () => void
  onWalk: () => void
  next: BenchJar | null
  onOpen: (code: string) => void
}

/** What is on record for this jar in this pull; a fresh entry can be voided with a reason, never changed. */
export function DonePanel({ jar, mayLog, onChange, onWalk, next, onOpen }: Props) {
  const [voiding, setVoiding] = useState<string | null>(null)
  const gone = new Set(jar.readings.flatMap((r) => (r.supersedesId ? [r.supersedesId] : [])))
  return (
    <div className="flex flex-1 flex-col gap-5 px-4 pb-6 pt-5 sm:px-7">
      <div className="flex items-end gap-6">
        <JarGlyph
          height={120}
          state={jar.state === 'missed' ? 'missed' : jar.state === 'done' ? 'drawn' : 'due'}
          topPercent={jar.layers?.topPercent ?? 0}
          bottomPercent={jar.layers?.bottomPercent ?? 0}
        />
        <h2 className="text-30 leading-tight sm:text-36">{headline(jar, mayLog)}</h2>
      </div>
      {jar.readings.length > 0 ? (
        <ul>
          {jar.readings
            .filter((r) => !r.isVoid)
            .map((r) => {
              const isGone = gone.has(r.id)
              const by = jar.readings.find((x) => x.supersedesId === r.id)
              return (
                <li
                  key={r.id}
                  className="flex min-h-16 flex-wrap items-center justify-between gap-3 border-b border-hair py-1"
                >
                  <span className={isGone ? 'text-soft' : ''}>
                    <b>{attributeName(r.attribute)}</b>{' '}
                    <span className={isGone ? 'line-through' : ''}>
                      {r.word ??
                        (r.value === null
                          ? r.typed
                          : shownWithUnit(writtenAs(jar.fields, r.attribute), r.value))}
                    </span>
                    <span className="block text-17 text-soft">
                      typed {r.typed} by {r.by}
                      {by ? `; ${by.isVoid ? 'voided' : 'corrected'}: ${by.reason}` : ''}
                      {r.doubts.length > 0 && !isGone ? `; doubt: ${r.doubts[0]?.sentence}` : ''}
                    </span>
                  </span>
                  {r.photoLines ? <ReadingPhoto lines={r.photoLines} of={`jar ${jar.code}`} /> : null}
                  {mayLog && !isGone ? (
                    <Button density="bench" kind="danger" onClick={() => setVoiding(r.id)}>
                      Void
                    </Button>
                  ) : null}
                </li>
              )
            })}
        </ul>
      ) : null}
      {mayLog && jar.state === 'missed' && jar.isStudyRunning ? (
        <MissedFollows jar={jar} onOpen={onOpen} onWalk={onWalk} />
      ) : null}
      <div className="flex flex-wrap gap-3">
        {mayLog && jar.isEarly && jar.isStudyRunning ? <EarlyAct jar={jar} onChange={onChange} /> : null}
        {next ? (
          <Button density="bench" kind="primary" onClick={() => onOpen(next.code)}>
            Open {next.name}
          </Button>
        ) : null}
        <Button density="bench" onClick={onWalk}>
          Back to the walk
        </Button>
      </div>
      {voiding ? (
        <VoidDialog
          id={voiding}
          name={jar.name}
          onClose={() => setVoiding(null)}
          onDone={() => {
            setVoiding(null)
            onChange()
          }}
        />
      ) : null}
    </div>
  )
}

function headline(jar: BenchJarPage, mayLog: boolean): string {
  if (jar.state === 'missed') return `Not read: ${jar.missedReason ?? ''}`
  if (jar.state === 'done')
    return `Read${jar.closedBy ? ` by ${jar.closedBy.name}` : ''}${jar.closedAt ? `, ${dayText(jar.closedAt)}` : ''}`
  if (!jar.isStudyRunning) return `Study ${jar.study.code} is closed; nothing is asked of this jar.`
  if (jar.isEarly) return `Not due yet: its window opens on ${dayText(jar.windowFrom)}.`
  return mayLog
    ? 'Nothing is asked of it now.'
    : `Due by ${dayText(jar.windowTo)}. A technician or formulator reads it.`
}

type VoidProps = { id: string; name: string; onClose: () => void; onDone: () => void }

function VoidDialog({ id, name, onClose, onDone }: VoidProps) {
  const [reason, setReason] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function voidIt() {
    setBusy(true)
    setError(null)
    try {
      await send(readingKeys.void(id), 'POST', { id: newId(), reason })
      onDone()
    } catch (refused) {
      setError(refused)
      setBusy(false)
    }
  }
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Void the reading of ${name}?`}
      sentence="It stays on record, struck through, with your reason and your name."
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button density="bench" kind="danger-asked" busy={isBusy} onClick={voidIt}>
            Void it
          </Button>
        </>
      }
    >
      <Field
        label="Reason"
        density="bench"
        value={reason}
        onText={setReason}
        error={error instanceof ClientError ? error.fields['reason'] : undefined}
      />
      <ErrorNote error={error} />
    </Dialog>
  )
}
