'use client'

import { useState } from 'react'
import { QuickReason } from '@/components/bench/quick-reason'
import { useKept } from '@/components/device/use-kept'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { cycleKeys } from '@/lib/cycle/keys'
import type { BoardPress } from '@/lib/cycle/queries/board'
import { beginsOf } from '@/lib/cycle/rules/entries'
import { beginLines } from '@/lib/cycle/rules/half-words'
import { newId } from '@/lib/db/id'
import { changeReasons } from './correct-dialog'
import { instantOfTyped, typedIn } from './earlier-time'
import type { HalfProps } from './half-row'
import { useEntering } from './use-entering'

/** When a half that runs really began. */
export function BeginDialog({
  place,
  half,
  begun,
  now,
  zone,
  presses,
  onClose,
}: HalfProps & { begun: BoardPress }) {
  const key = `cycle.begun.${begun.id}`
  const [{ at, reason }, change] = useKept(key, { at: typedIn(begun.at, zone), reason: '' })
  const [id] = useState(newId)
  const entering = useEntering(onClose)
  const begunAt = typedIn(begun.at, zone) === at ? begun.at : instantOfTyped(at, zone)
  const lines = (one: { at: string }) => beginLines({ ...one, isVoid: false }, { now, zone }).join(', ')

  function correct(): Promise<void> {
    return entering.run(() =>
      presses.enter(place, half, {
        url: cycleKeys.correctBegin(begun.id),
        body: { id, change: 'correct', version: beginsOf(place, half).length, reason, begunAt },
        done: 'has another begin',
        what: `corrected: ${begunAt ? lines({ at: begunAt }) : ''}`,
        draft: { key, value: { at, reason } },
      }),
    )
  }

  return (
    <Dialog
      isOpen
      density="bench"
      width={680}
      onClose={onClose}
      title={`When did the ${half.half} half of cycle ${half.cycle} begin?`}
      sentence={`It stands as ${lines(begun)}. That stays on record, struck through, with your reason and your name.`}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={entering.isBusy}
            why={begunAt ? (reason.trim() === '' ? 'Say why first.' : undefined) : 'Type when it began.'}
            onClick={correct}
          >
            Correct it
          </Button>
        </>
      }
    >
      <Field
        type="datetime-local"
        label={`Begun at, in ${zone}`}
        density="bench"
        value={at}
        onText={(typed) => {
          entering.forget()
          change({ at: typed })
        }}
        {...(entering.fields['begunAt'] ? { error: entering.fields['begunAt'] } : {})}
      />
      <QuickReason
        choices={changeReasons}
        reason={reason}
        onReason={(why) => change({ reason: why })}
        error={entering.fields['reason']}
      />
      <ErrorNote error={entering.error} />
    </Dialog>
  )
}
