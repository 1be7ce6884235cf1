'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'
import { sideOf } from '@/lib/science/temperature-log'
import { stationKeys } from '@/lib/station/schema'

type Station = { id: string; name: string; lowC: number | null; highC: number | null }

/** One temperature, read now. */
export function TemperatureDialog({
  station,
  onClose,
  onDone,
}: {
  station: Station
  onClose: () => void
  onDone: () => void
}) {
  const [id] = useState(newId)
  const [text, setText] = useState('')
  const [value, setValue] = useState<number | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const side = value === null ? null : sideOf(station, value)

  async function save() {
    setBusy(true)
    setError(null)
    try {
      // A device whose clock runs ahead must not read a temperature in the future.
      const measuredAt = new Date(Date.now() - 1000).toISOString()
      await send(stationKeys.record(station.id), 'POST', {
        readings: [{ id, measuredAt, temperatureC: value }],
      })
      toast(`${text} °C is logged for ${station.name}`)
      onDone()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Temperature of ${station.name}`}
      sentence="As its display or thermometer shows it now."
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button
            kind="primary"
            busy={busy}
            why={value === null ? 'Type the temperature.' : undefined}
            onClick={save}
          >
            Log it
          </Button>
        </>
      }
    >
      <NumberField
        label="Temperature"
        unit="°C"
        value={text}
        onText={(typed, number) => {
          setText(typed)
          setValue(number)
        }}
        hint={side ? `This is ${side} its limits: the record will call it an excursion.` : undefined}
      />
      <ErrorNote error={error} />
    </Dialog>
  )
}
