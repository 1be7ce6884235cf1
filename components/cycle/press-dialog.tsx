'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { EarlierTime, instantOfTyped } from './earlier-time'
import { HoldReason } from './hold-reason'

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
      {asksReason ? <HoldReason label="Why it is held" reason={reason} onReason={setReason} /> : null}
      <EarlierTime label="At an earlier time" value={earlier} now={now} zone={zone} onSet={setEarlier} />
      <ErrorNote error={error} />
    </Dialog>
  )
}
