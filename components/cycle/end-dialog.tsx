'use client'

import { useState } from 'react'
import { useKept } from '@/components/device/use-kept'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import type { Running } from '@/lib/cycle/rules/state'
import { EarlierTime, instantOfTyped } from './earlier-time'
import { emptyReached, ReachedFields } from './half-fields'
import { reachedOf, unreadable } from './half-text'
import { ShortNote } from './short-note'

export type Ending = ReturnType<typeof reachedOf> & { claimedAt?: string; isConfirmed: boolean }
type Props = {
  place: CyclePlace
  state: Running
  now: string
  zone: string
  onEnd: (ending: Ending) => Promise<void>
  onClose: () => void
}

/** The end of a half: what was reached, and at once in what it falls short. */
export function EndDialog({ place, state, now, zone, onEnd, onClose }: Props) {
  const { cycle, half } = state
  const [{ earlier, ...text }, change, forget] = useKept<typeof emptyReached & { earlier: string | null }>(
    `cycle.end.${place.id}.${cycle}.${half}`,
    { ...emptyReached, earlier: null },
  )
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const endedAt = earlier === null ? now : (instantOfTyped(earlier, zone) ?? now)
  const hours = (Date.parse(endedAt) - Date.parse(state.begunAt)) / 3_600_000
  const reached = reachedOf(text)
  const short = shortfalls(place, { cycle, half, ...reached, hours }, place.asked ?? undefined)

  async function end() {
    setBusy(true)
    setError(null)
    try {
      await onEnd({
        ...(earlier === null ? {} : { claimedAt: endedAt }),
        ...reached,
        isConfirmed: short.length > 0,
      })
      forget()
      onClose()
    } catch (refused) {
      setError(refused)
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      density="bench"
      width={640}
      onClose={onClose}
      title={`End the ${half} half of cycle ${cycle}`}
      sentence={`${place.studyCode}, ${place.stationName}. ${half === 'cold' ? place.caution : ''}`}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind={short.length > 0 ? 'danger-asked' : 'primary'}
            busy={isBusy}
            why={unreadable(text.reached, text.core)}
            onClick={end}
          >
            {short.length > 0 ? 'End it short' : 'End it'}
          </Button>
        </>
      }
    >
      <ReachedFields half={half} place={place} text={text} onText={change} autoFocus />
      <EarlierTime
        label="Ended earlier"
        value={earlier}
        now={now}
        zone={zone}
        onSet={(at) => change({ earlier: at })}
      />
      <Field label="Note" density="bench" value={text.note} onText={(note) => change({ note })} />
      <ShortNote short={short}>
        Ended so, every reading after it carries a doubt until someone answers it.
      </ShortNote>
      <ErrorNote error={error} />
    </Dialog>
  )
}
