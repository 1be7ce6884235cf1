'use client'

import { useState } from 'react'
import { QuickReason } from '@/components/bench/quick-reason'
import { useKept } from '@/components/device/use-kept'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { cycleKeys } from '@/lib/cycle/keys'
import type { BoardStep } from '@/lib/cycle/queries/board'
import { entriesOf } from '@/lib/cycle/rules/entries'
import { hoursOf, stepLines } from '@/lib/cycle/rules/half-words'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { newId } from '@/lib/db/id'
import { HalfFields } from './half-fields'
import { halfOf, textOf, unreadable } from './half-text'
import type { HalfProps } from './half-row'
import { ShortNote } from './short-note'
import { useEntering } from './use-entering'

export const changeReasons = ['misread', 'typed wrong', 'pressed too late', 'pressed too early'] as const

/** What an ended half should be takes the place of what stands there; both stay on record with the reason. */
export function CorrectDialog({
  place,
  half,
  step,
  now,
  zone,
  presses,
  onClose,
}: HalfProps & { step: BoardStep }) {
  const key = `cycle.correct.${step.id}`
  const [{ reason, ...text }, change] = useKept(key, { ...textOf(step, zone), reason: '' })
  const [id] = useState(newId)
  const entering = useEntering(onClose)
  const numbers = unreadable(text.reached, text.core, text.held)
  const typed = halfOf(text, zone, step)
  const short = typed
    ? shortfalls(place, { ...half, ...typed, hours: hoursOf(typed) }, place.asked ?? undefined)
    : []

  function correct(): Promise<void> {
    const what = typed ? stepLines(typed, { now, zone }).join(', ') : ''
    return entering.run(() =>
      presses.enter(place, half, {
        url: cycleKeys.correctHalf(step.id),
        body: {
          ...{ id, change: 'correct', version: entriesOf(place, half).length, reason },
          ...{ ...typed, isConfirmed: entering.isAsked },
        },
        done: 'is corrected',
        what: `corrected: ${what}`,
        draft: { key, value: { ...text, reason } },
      }),
    )
  }

  return (
    <Dialog
      isOpen
      density="bench"
      width={680}
      onClose={onClose}
      title={`Correct the ${half.half} half of cycle ${half.cycle}`}
      sentence={`It stands as ${stepLines(step, { now, zone }).join(', ')}. That stays on record, struck through, with your reason and your name.`}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind={entering.isAsked ? 'danger-asked' : 'primary'}
            busy={entering.isBusy}
            why={
              typed
                ? (numbers ?? (reason.trim() === '' ? 'Say why first.' : undefined))
                : 'Type when it began and ended.'
            }
            onClick={correct}
          >
            {entering.isAsked ? 'It is so, correct it' : 'Correct it'}
          </Button>
        </>
      }
    >
      <HalfFields
        {...{ half: half.half, place, zone, text }}
        when={{ begun: 'Begun at', ended: 'Ended at' }}
        errors={entering.fields}
        onText={(changed) => {
          entering.forget()
          change(changed)
        }}
      />
      <QuickReason
        choices={changeReasons}
        reason={reason}
        onReason={(why) => change({ reason: why })}
        error={entering.fields['reason']}
      />
      {entering.isAsked ? null : (
        <ShortNote short={short}>
          So corrected, every reading after it carries a doubt until someone answers it.
        </ShortNote>
      )}
      <ErrorNote error={entering.error} />
    </Dialog>
  )
}
