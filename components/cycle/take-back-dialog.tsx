'use client'

import { useState } from 'react'
import { QuickReason } from '@/components/bench/quick-reason'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { RadioGroup } from '@/components/ui/radio-group'
import { cycleKeys } from '@/lib/cycle/keys'
import type { BoardPress, BoardStep } from '@/lib/cycle/queries/board'
import { beginsOf, entriesOf } from '@/lib/cycle/rules/entries'
import { newId } from '@/lib/db/id'
import type { HalfProps } from './half-row'
import { useEntering } from './use-entering'

const reasons = ['pressed by mistake', 'another study', 'another half', 'typed twice'] as const

type Props = HalfProps & {
  /** What is taken back: a half that has ended, or the begin of one that runs. */
  step: BoardStep | null
  begun: BoardPress | null
  /** It was begun at the board and nothing came after it, so it can run on. */
  mayRunOn: boolean
}

/** A half that was never done, or that had not ended: it stays on record, struck through. */
export function TakeBackDialog({ place, half, step, begun, mayRunOn, presses, onClose }: Props) {
  const [reason, setReason] = useState('')
  const [change, setChange] = useState<string>(mayRunOn ? '' : 'take back')
  const [id] = useState(newId)
  const entering = useEntering(onClose)
  const version = (step ? entriesOf(place, half) : beginsOf(place, half)).length

  function takeBack(): Promise<void> {
    const done = change === 'run on' ? 'runs on' : 'is taken back'
    return entering.run(() =>
      presses.enter(place, half, {
        url: step ? cycleKeys.correctHalf(step.id) : cycleKeys.correctBegin(begun!.id),
        body: { id, change, version, reason, ...(step ? { isConfirmed: entering.isAsked } : {}) },
        done,
        what: `${done}: ${reason}`,
      }),
    )
  }

  const act = change === 'run on' ? 'Let it run on' : 'Take it back'
  return (
    <Dialog
      isOpen
      density="bench"
      width={640}
      onClose={onClose}
      title={`Take back the ${half.half} half of cycle ${half.cycle}?`}
      sentence="It stays on record, struck through, with your reason and your name."
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="danger-asked"
            busy={entering.isBusy}
            why={
              change === '' ? 'Say what is so first.' : reason.trim() === '' ? 'Say why first.' : undefined
            }
            onClick={takeBack}
          >
            {entering.isAsked ? `It is so, ${act.toLowerCase()}` : act}
          </Button>
        </>
      }
    >
      {mayRunOn ? (
        <RadioGroup
          label="What is so"
          density="bench"
          layout="ledger"
          value={change}
          onPick={(picked) => {
            entering.forget()
            setChange(picked)
          }}
          options={[
            { value: 'run on', label: 'It has not ended: it runs on' },
            { value: 'take back', label: 'It was not done at all' },
          ]}
        />
      ) : null}
      <QuickReason choices={reasons} reason={reason} onReason={setReason} error={entering.fields['reason']} />
      <ErrorNote error={entering.error} />
    </Dialog>
  )
}
