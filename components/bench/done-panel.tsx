'use client'

import { useState } from 'react'
import { CorrectDialog, VoidDialog } from '@/components/bench/change-dialogs'
import { EarlyAct, MissedFollows } from '@/components/bench/missed-follows'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { ReadingPhoto } from '@/components/photo/reading-photo'
import { Button } from '@/components/ui/button'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import type { BenchJar } from '@/lib/bench/queries/bench-jar'
import { placeOf } from '@/lib/jar/rules/at-hand'
import type { EntryDetail } from '@/lib/reading/schema/entry'
import { attributeName } from '@/lib/reading/schema/attributes'
import { dayText } from '@/lib/report/rules'
import { dayIn } from '@/lib/study/rules/calendar'
import { writtenAs } from '@/lib/bench/rules'
import { capital, shownWithUnit } from '@/lib/study/rules/words'

export type JarReading = BenchJarPage['readings'][number]

type Props = {
  jar: BenchJarPage
  personId: string
  mayLog: boolean
  onChange: () => void
  onWalk: () => void
  next: BenchJar | null
  onOpen: (code: string) => void
}

/** What is on record for this jar in this pull; a fresh entry can be voided with a reason, never changed. */
export function DonePanel({ jar, personId, mayLog, onChange, onWalk, next, onOpen }: Props) {
  const [changing, setChanging] = useState<{ id: string; how: 'correct' | 'void' } | null>(null)
  const chains = chainsOf(jar.readings)
  const changed = jar.readings.find((r) => r.id === changing?.id)
  const close = () => setChanging(null)
  function closeAndTell() {
    close()
    onChange()
  }
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
      {chains.length > 0 ? (
        <ul>
          {chains.map((chain) => {
            const current = chain.at(-1)!
            const isMine = mayLog && !current.isVoid && isOwnToday(current, personId, jar)
            return (
              <li
                key={chain[0]!.id}
                className="flex min-h-16 flex-wrap items-center justify-between gap-3 border-b border-hair py-2"
              >
                <div className={current.isVoid ? 'text-soft' : ''}>
                  {chain
                    .filter((r) => !r.isVoid)
                    .map((r) => (
                      <ReadingLine
                        key={r.id}
                        jar={jar}
                        reading={r}
                        by={chain.find((x) => x.supersedesId === r.id)}
                      />
                    ))}
                </div>
                {current.isVoid ? null : (
                  <ReadingPhoto detail={current.detail as EntryDetail} of={`jar ${jar.code}`} />
                )}
                {isMine ? (
                  <div className="flex gap-3">
                    <Button density="bench" onClick={() => setChanging({ id: current.id, how: 'correct' })}>
                      Correct
                    </Button>
                    <Button
                      density="bench"
                      kind="danger"
                      onClick={() => setChanging({ id: current.id, how: 'void' })}
                    >
                      Void
                    </Button>
                  </div>
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
      {changed && changing?.how === 'correct' ? (
        <CorrectDialog jar={jar} reading={changed} onClose={close} onDone={closeAndTell} />
      ) : null}
      {changed && changing?.how === 'void' ? (
        <VoidDialog id={changed.id} name={jar.name} onClose={close} onDone={closeAndTell} />
      ) : null}
    </div>
  )
}

function headline(jar: BenchJarPage, mayLog: boolean): string {
  if (jar.state === 'missed') return `Not read. ${capital(jar.missedReason ?? '')}`
  if (jar.state === 'done')
    return `Read${jar.closedBy ? ` by ${jar.closedBy.name}` : ''}${jar.closedAt ? `, ${dayText(jar.closedAt)}` : ''}`
  if (!jar.isStudyRunning) return `Study ${jar.study.code} is closed; nothing is asked of this jar.`
  if (jar.isEarly)
    return `Not due yet: due on ${dayText(jar.dueOn)}, and read from ${dayText(jar.windowFrom)}. It belongs ${placeOf({ ...jar, stationName: jar.station.name })}.`
  return mayLog
    ? 'Nothing is asked of it now.'
    : `Due by ${dayText(jar.windowTo)}. A technician or formulator reads it.`
}

/** Each first entry with what took its place, in order. */
function chainsOf(readings: JarReading[]): JarReading[][] {
  const after = (id: string) => readings.find((r) => r.supersedesId === id)
  return readings
    .filter((r) => r.supersedesId === null)
    .map((first) => {
      const chain = [first]
      for (let next = after(first.id); next; next = after(next.id)) chain.push(next)
      return chain
    })
}

/** A technician mends an own entry on the lab's day it was made; later ones are the formulator's, at the Desk. */
function isOwnToday(reading: JarReading, personId: string, jar: BenchJarPage): boolean {
  return reading.recordedBy === personId && dayIn(jar.zone, reading.recordedAt) === jar.today
}

type LineProps = { jar: BenchJarPage; reading: JarReading; by: JarReading | undefined }

/** One value as it was entered; struck through where another took its place, with why. */
function ReadingLine({ jar, reading, by }: LineProps) {
  const { word, value, typed, doubts } = reading
  return (
    <p className={by ? 'text-soft' : ''}>
      <b>{attributeName(reading.attribute)}</b>{' '}
      <span className={by ? 'line-through' : ''}>
        {word ?? (value === null ? typed : shownWithUnit(writtenAs(jar.fields, reading.attribute), value))}
      </span>
      <span className="block text-17 text-soft">
        {reading.detail['isEstimate'] ? 'an estimate; ' : ''}typed {typed} by {reading.by}
        {by ? `; ${by.isVoid ? 'voided' : 'corrected'}: ${by.reason}` : ''}
        {doubts.length > 0 && !by ? `; doubt: ${doubts[0]?.sentence}` : ''}
      </span>
    </p>
  )
}
