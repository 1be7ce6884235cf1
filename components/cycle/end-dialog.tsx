'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { RadioGroup } from '@/components/ui/radio-group'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import type { Running } from '@/lib/cycle/rules/state'
import { EarlierTime, instantOfTyped } from './earlier-time'

export type Ending = {
  claimedAt?: string
  reachedC: number | null
  coreC: number | null
  isFrozenThrough: boolean | null
  note: string
  isConfirmed: boolean
}
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
  const [reached, setReached] = useState<{ text: string; value: number | null }>({ text: '', value: null })
  const [core, setCore] = useState<{ text: string; value: number | null }>({ text: '', value: null })
  const [frozen, setFrozen] = useState<string | null>(null)
  const [earlier, setEarlier] = useState<string | null>(null)
  const [note, setNote] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const isCold = state.half === 'cold'
  const endedAt = earlier === null ? now : (instantOfTyped(earlier, zone) ?? now)
  const short = shortfalls(
    place,
    {
      cycle: state.cycle,
      half: state.half,
      reachedC: reached.value,
      coreC: core.value,
      isFrozenThrough: frozen === null ? null : frozen === 'yes',
      hours: (Date.parse(endedAt) - Date.parse(state.begunAt)) / 3_600_000,
    },
    place.asked ?? undefined,
  )
  const asked = isCold ? place.cycleLowC : place.cycleHighC

  async function end() {
    setBusy(true)
    setError(null)
    try {
      await onEnd({
        ...(earlier === null ? {} : { claimedAt: endedAt }),
        reachedC: reached.value,
        coreC: core.value,
        isFrozenThrough: frozen === null ? null : frozen === 'yes',
        note,
        isConfirmed: short.length > 0,
      })
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
      title={`End the ${state.half} half of cycle ${state.cycle}`}
      sentence={`${place.studyCode}, ${place.stationName}. ${isCold ? place.caution : ''}`}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind={short.length > 0 ? 'danger-asked' : 'primary'}
            busy={isBusy}
            onClick={end}
          >
            {short.length > 0 ? 'End it short' : 'End it'}
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap items-start gap-3">
        <NumberField
          label={asked === null ? 'Reached' : `Reached, of ${String(asked).replace('-', '−')} °C`}
          unit="°C"
          density="bench"
          value={reached.text}
          onText={(text, value) => setReached({ text, value })}
          wrap="min-w-[180px] flex-1"
          autoFocus
        />
        {isCold ? (
          <NumberField
            label="Core of the dummy jar"
            unit="°C"
            density="bench"
            value={core.text}
            onText={(text, value) => setCore({ text, value })}
            wrap="min-w-[180px] flex-1"
          />
        ) : null}
      </div>
      {isCold ? (
        <RadioGroup
          label="Frozen through"
          density="bench"
          value={frozen}
          onPick={setFrozen}
          options={[
            { value: 'yes', label: 'yes' },
            { value: 'no', label: 'no' },
          ]}
        />
      ) : null}
      <EarlierTime label="Ended earlier" value={earlier} now={now} zone={zone} onSet={setEarlier} />
      <Field label="Note" density="bench" value={note} onText={setNote} />
      <div aria-live="polite">
        {short.length > 0 ? (
          <div className="border-l-4 border-alarm py-1 pl-3 text-18">
            <p className="font-650 text-alarm">{short.join(' ')}</p>
            <p>Ended so, every reading after it carries a doubt until someone answers it.</p>
          </div>
        ) : null}
      </div>
      <ErrorNote error={error} />
    </Dialog>
  )
}
