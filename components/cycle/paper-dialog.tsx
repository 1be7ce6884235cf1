'use client'

import { useState } from 'react'
import { useKept } from '@/components/device/use-kept'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { cycleKeys } from '@/lib/cycle/keys'
import { hoursOf, stepLines } from '@/lib/cycle/rules/half-words'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { newId } from '@/lib/db/id'
import { HalfFields } from './half-fields'
import { emptyHalf, halfOf, unreadable } from './half-text'
import { ShortNote } from './short-note'
import { useEntering } from './use-entering'
import type { HalfProps } from './half-row'

/** A half that was done by hand and written on paper; the server keeps when it was typed, too. */
export function PaperDialog({ place, half: { cycle, half }, now, zone, presses, onClose }: HalfProps) {
  const key = `cycle.paper.${place.id}.${cycle}.${half}`
  const [text, change] = useKept(key, emptyHalf)
  const [id] = useState(newId)
  const entering = useEntering(onClose)
  const numbers = unreadable(text.reached, text.core, text.held)
  const typed = halfOf(text, zone)
  const short = typed
    ? shortfalls(place, { cycle, half, ...typed, hours: hoursOf(typed) }, place.asked ?? undefined)
    : []

  function enter(): Promise<void> {
    return entering.run(() =>
      presses.enter(
        place,
        { cycle, half },
        {
          url: cycleKeys.log,
          body: { id, studyStationId: place.id, cycle, half, ...typed, isConfirmed: entering.isAsked },
          done: 'is typed from paper',
          what: typed ? `from paper: ${stepLines(typed, { now, zone }).join(', ')}` : '',
          draft: { key, value: text },
        },
      ),
    )
  }

  return (
    <Dialog
      isOpen
      density="bench"
      width={680}
      onClose={onClose}
      title={`From paper: the ${half} half of cycle ${cycle}`}
      sentence={`${place.studyCode}, ${place.stationName}. It stands under the times on the paper; when you typed it is kept beside them.`}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind={entering.isAsked ? 'danger-asked' : 'primary'}
            busy={entering.isBusy}
            why={typed ? numbers : 'Type when it really began and ended.'}
            onClick={enter}
          >
            {entering.isAsked ? 'It is so, keep it' : 'Keep it'}
          </Button>
        </>
      }
    >
      <HalfFields
        {...{ half, place, zone, text }}
        when={{ begun: 'Really begun at', ended: 'Really ended at' }}
        errors={entering.fields}
        onText={(changed) => {
          entering.forget()
          change(changed)
        }}
      />
      {entering.isAsked ? null : (
        <ShortNote short={short}>
          Kept so, every reading after it carries a doubt until someone answers it.
        </ShortNote>
      )}
      <ErrorNote error={entering.error} />
    </Dialog>
  )
}
