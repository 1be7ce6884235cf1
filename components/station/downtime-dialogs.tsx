'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { Downtime, TouchedPull } from '@/lib/station/queries/downtimes'
import { periodText } from '@/lib/station/rules/downtime'
import type { Leaving } from '@/lib/station/rules/occupancy'
import { stationKeys } from '@/lib/station/keys'
import { Touched } from './touched'

type Station = { id: string; name: string }
type Ends = { onClose: () => void; onDone: () => void }

/** From when to when and why; what it touches is said while the days are chosen. */
export function DowntimeDialog({
  station,
  pulls,
  leavings,
  today,
  onClose,
  onDone,
}: Ends & { station: Station; pulls: TouchedPull[]; leavings: Leaving[]; today: string }) {
  const [id] = useState(newId)
  const [fromOn, setFromOn] = useState('')
  const [toOn, setToOn] = useState('')
  const [reason, setReason] = useState('')
  const { error, busy, run } = useSending(onClose, onDone)
  const fields = error instanceof ClientError ? error.fields : {}
  const period = { fromOn, toOn: toOn || fromOn }
  const isPeriod = fromOn !== '' && period.toOn >= fromOn

  const save = () =>
    run(async () => {
      await send(stationKeys.downtimes(station.id), 'POST', { id, ...period, reason })
      toast(`${station.name} is out of use ${periodText(period)}`)
    })

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Days on which ${station.name} is out of use`}
      sentence="For a service or a repair that is known ahead. The jars stay where they stand."
      width={560}
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={save}>
            Plan it
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap gap-3">
        <Field
          label="First day"
          type="date"
          min={today}
          value={fromOn}
          onText={setFromOn}
          error={fields['fromOn']}
          wrap="flex-1 min-w-[150px]"
        />
        <Field
          label="Last day"
          type="date"
          min={fromOn || today}
          value={toOn}
          onText={setToOn}
          error={fields['toOn']}
          wrap="flex-1 min-w-[150px]"
        />
      </div>
      <Field label="Why" value={reason} onText={setReason} error={fields['reason']} />
      {isPeriod ? <Touched period={period} pulls={pulls} leavings={leavings} /> : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}

export function CancelDowntimeDialog({
  station,
  downtime,
  onClose,
  onDone,
}: Ends & { station: Station; downtime: Downtime }) {
  const [id] = useState(newId)
  const [reason, setReason] = useState('')
  const { error, busy, run } = useSending(onClose, onDone)
  const fields = error instanceof ClientError ? error.fields : {}

  const cancel = () =>
    run(async () => {
      await send(stationKeys.cancelDowntime(station.id, downtime.id), 'POST', { id, reason })
      toast(`${station.name} stays in use ${periodText(downtime)}`)
    })

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Cancel it ${periodText(downtime)}?`}
      sentence="The entry stays on record, with this one beside it."
      acts={
        <>
          <Button onClick={onClose}>Leave it planned</Button>
          <Button kind="primary" busy={busy} onClick={cancel}>
            Cancel the downtime
          </Button>
        </>
      }
    >
      <Field label="Why" value={reason} onText={setReason} error={fields['reason']} />
      <ErrorNote error={error} />
    </Dialog>
  )
}

function useSending(onClose: () => void, onDone: () => void) {
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  async function run(work: () => Promise<void>) {
    setBusy(true)
    setError(null)
    try {
      await work()
      onDone()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }
  return { error, busy, run }
}
