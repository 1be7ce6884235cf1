'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readTyped } from '@/lib/number/rules'
import { toast } from '@/components/ui/toast'
import { calibrationKeys } from '@/lib/calibration/schema'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { addDays } from '@/lib/study/rules/calendar'

type Props = {
  instrument: { id: string; code: string; kind: string }
  today: string
  onClose: () => void
  onDone: () => void
}

const holdsDays: Record<string, number> = { meter: 1, viscometer: 90, balance: 180 }

/** A calibration as its numbers; the server judges them and says what they show. */
export function CalibrationDialog({ instrument, today, onClose, onDone }: Props) {
  const [id] = useState(newId)
  const [texts, setTexts] = useState<Record<string, string>>(() => startOf(instrument.kind))
  const [dueOn, setDueOn] = useState(() => addDays(today, holdsDays[instrument.kind] ?? 30))
  const [note, setNote] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const part = (key: string, label: string, path: string, unit?: string) => (
    <NumberField
      key={key}
      label={label}
      unit={unit}
      value={texts[key] ?? ''}
      onText={(text) => setTexts((before) => ({ ...before, [key]: text }))}
      error={fields[`check.${path}`]}
      wrap="w-[150px]"
    />
  )

  async function save() {
    setBusy(true)
    setError(null)
    try {
      const check = checkOf(instrument.kind, texts)
      const made = await send<{ result: string; sentence: string }>(calibrationKeys.list, 'POST', {
        id,
        instrumentId: instrument.id,
        dueOn,
        check,
        note,
      })
      toast(`${instrument.code} is ${made.result}. ${made.sentence}`, { isAlarm: made.result === 'doubtful' })
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
      title={`Calibrate ${instrument.code}`}
      sentence={sentences[instrument.kind]}
      width={520}
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={save}>
            Log the calibration
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap items-start gap-3">
        {instrument.kind === 'meter' ? (
          <>
            {[1, 2, 3].map((row) => (
              <div key={row} className="flex w-full flex-wrap gap-3">
                {part(`ph${row}`, `Buffer ${row}, pH`, `points.${row - 1}.bufferPh`)}
                {part(`mv${row}`, 'shows', `points.${row - 1}.mV`, 'mV')}
              </div>
            ))}
            {part('temperature', 'Buffers at', 'temperatureC', '°C')}
          </>
        ) : null}
        {instrument.kind === 'viscometer' ? (
          <>
            <Field
              label="Spindle"
              value={texts['spindle'] ?? ''}
              onText={(text) => setTexts((before) => ({ ...before, spindle: text }))}
              error={fields['check.spindle']}
              wrap="w-[150px]"
            />
            {part('rpm', 'Speed', 'rpm', 'rpm')}
            {part('fluid', 'Check fluid', 'fluidMPas', 'mPa·s')}
            {part('read', 'Reads', 'readMPas', 'mPa·s')}
          </>
        ) : null}
        {instrument.kind === 'balance' ? (
          <>
            {part('weight', 'Weight', 'weightG', 'g')}
            {part('read', 'Reads', 'readG', 'g')}
          </>
        ) : null}
      </div>
      <Field
        type="date"
        label="Holds until"
        value={dueOn}
        onText={setDueOn}
        error={fields['dueOn']}
        wrap="w-[190px]"
      />
      <Field label="Note" value={note} onText={setNote} />
      <ErrorNote error={error} />
    </Dialog>
  )
}

const sentences: Record<string, string> = {
  meter: 'Two or three buffers, with the value on their own certificate at their temperature.',
  viscometer: 'A check fluid of known viscosity, within 2 % of its value.',
  balance: 'A weight of known mass, within 0.01 g.',
}

function startOf(kind: string): Record<string, string> {
  return kind === 'meter' ? { ph1: '7.00', ph2: '4.01', ph3: '', temperature: '25' } : {}
}

function checkOf(kind: string, texts: Record<string, string>) {
  const number = (key: string) => readTyped(texts[key] ?? '')
  if (kind === 'meter') {
    return {
      kind,
      temperatureC: number('temperature'),
      points: [1, 2, 3]
        .filter((row) => (texts[`mv${row}`] ?? '').trim() !== '')
        .map((row) => ({ bufferPh: number(`ph${row}`), mV: number(`mv${row}`) })),
    }
  }
  if (kind === 'viscometer') {
    return {
      kind,
      spindle: texts['spindle'] ?? '',
      rpm: number('rpm'),
      fluidMPas: number('fluid'),
      readMPas: number('read'),
    }
  }
  return { kind, weightG: number('weight'), readG: number('read') }
}
