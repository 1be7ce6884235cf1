'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { EarlierTime, instantOfTyped } from './earlier-time'

export type Pressing = { claimedAt?: string; reason: string }
type Props = {
  title: string
  act: string
  /** A hold says why. */
  asksReason: boolean
  now: string
  zone: string
  onPress: (pressing: Pressing) => Promise<void>
  onClose: () => void
}

const reasons = ['weekend', 'holiday', 'freezer out of use']

/** A press that says more than that it is pressed: an earlier time, or why a half is held. */
export function PressDialog({ title, act, asksReason, now, zone, onPress, onClose }: Props) {
  const [reason, setReason] = useState('')
  const [earlier, setEarlier] = useState<string | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function press() {
    setBusy(true)
    setError(null)
    try {
      const claimedAt = earlier === null ? null : instantOfTyped(earlier, zone)
      await onPress({ ...(claimedAt ? { claimedAt } : {}), reason })
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
      onClose={onClose}
      title={title}
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={isBusy}
            why={asksReason && reason.trim() === '' ? 'Say why first.' : undefined}
            onClick={press}
          >
            {act}
          </Button>
        </>
      }
    >
      {asksReason ? (
        <>
          <div className="flex flex-wrap gap-3">
            {reasons.map((one) => (
              <Button key={one} density="bench" onClick={() => setReason(one)}>
                {one}
              </Button>
            ))}
          </div>
          <Field label="Why it is held" density="bench" value={reason} onText={setReason} />
        </>
      ) : null}
      <EarlierTime label="At an earlier time" value={earlier} now={now} zone={zone} onSet={setEarlier} />
      <ErrorNote error={error} />
    </Dialog>
  )
}
