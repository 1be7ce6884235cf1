'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { useOutbox } from '@/components/device/use-outbox'
import { Button, type Density } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { afterKey, NumberPad } from '@/components/ui/number-pad'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { fetcher } from '@/lib/http/fetcher'
import { sideOf } from '@/lib/science/temperature-log'
import type { stationRecord } from '@/lib/station/queries/record'
import { stationKeys } from '@/lib/station/keys'
import { readDecimal } from '@/lib/number/rules'

type Props = {
  station: { id: string; name: string }
  density?: Density
  onClose: () => void
  onDone: () => void
}
type Record = Awaited<ReturnType<typeof stationRecord>>

/** One temperature, read now, beside the limits and what was read before today. */
export function TemperatureDialog({ station, density, onClose, onDone }: Props) {
  const [id] = useState(newId)
  const [text, setText] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const [from] = useState(() => new Date(Date.now() - 24 * 3_600_000).toISOString())
  const { data: record } = useSWR<Record>(
    `${stationKeys.record(station.id)}?from=${encodeURIComponent(from)}`,
    fetcher,
  )
  const outbox = useOutbox()
  const value = readDecimal(text)
  const limits = record?.station ?? null
  const side = value === null || !limits ? null : sideOf(limits, value)
  const isBench = density === 'bench'

  async function save() {
    setBusy(true)
    setError(null)
    try {
      // A device whose clock runs ahead must not read a temperature in the future.
      const measuredAt = new Date(Date.now() - 1000).toISOString()
      const outcome = await outbox.send({
        url: stationKeys.record(station.id),
        body: { readings: [{ id, measuredAt, temperatureC: value }], deviceNow: new Date().toISOString() },
        about: {
          kind: 'temperature',
          label: `${station.name}, ${text} °C`,
          subject: station.id,
        },
      })
      toast(`${text} °C is logged for ${station.name}`, {
        ...(density ? { density } : {}),
        ...(outcome.how === 'kept' ? { detail: 'Kept on this device; it goes out by itself.' } : {}),
      })
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
      density={density}
      onClose={onClose}
      title={`Temperature of ${station.name}`}
      sentence={record ? <Before record={record} /> : 'As its display or thermometer shows it now.'}
      acts={
        <>
          <Button density={density} onClick={onClose}>
            Leave it
          </Button>
          <Button
            density={density}
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
      <Field
        label={limits ? `Now, ${limitsText(limits)}` : 'Now'}
        unit="°C"
        density={density}
        value={text}
        onText={setText}
        inputMode={isBench ? 'none' : 'decimal'}
        className={`text-right ${isBench ? 'text-64 font-650' : ''}`}
        error={side ? `This is ${side} its limits: the record will call it an excursion.` : undefined}
        autoFocus
      />
      {isBench ? <NumberPad hasMinus onKey={(key) => setText((typed) => afterKey(typed, key))} /> : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}

/** What was read in the last day: the newest with who and when, the least and the most. */
function Before({ record }: { record: Record }) {
  const last = record.log.at(-1)
  if (!last || record.minC === null || record.maxC === null)
    return <>Nothing was read in the last 24 hours. Type what its display or thermometer shows now.</>
  const time = new Date(last.measuredAt).toLocaleTimeString('en-GB', { timeStyle: 'short' })
  return (
    <>
      Last {shown(last.temperatureC)} °C at {time} by {last.initials}. In 24 hours from {shown(record.minC)}{' '}
      to {shown(record.maxC)} °C.
    </>
  )
}

function limitsText({ lowC, highC }: { lowC: number | null; highC: number | null }): string {
  if (lowC !== null && highC !== null) return `limits ${shown(lowC)} to ${shown(highC)} °C`
  if (lowC !== null) return `at least ${shown(lowC)} °C`
  return highC !== null ? `at most ${shown(highC)} °C` : 'no limits'
}

function shown(value: number): string {
  return value.toFixed(1).replace('-', '−').replace(/\.0$/, '')
}
