'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { calibrationKeys } from '@/lib/calibration/keys'
import { newId } from '@/lib/db/id'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { LotRow } from '@/lib/lot/queries'
import { lotKeys } from '@/lib/lot/keys'
import { readTyped } from '@/lib/number/rules'
import { addDays } from '@/lib/study/rules/calendar'
import { MeterCheck, pointOf, type MeterDraft } from './meter-check'

type Props = {
  instrument: { id: string; code: string; kind: string }
  today: string
  onClose: () => void
  onDone: () => void
}

const holdsDays: Record<string, number> = { meter: 1, viscometer: 90, balance: 180 }

/** A calibration as its numbers; the server judges them and says what they show, and what a bad one reaches back to. */
export function CalibrationDialog({ instrument, today, onClose, onDone }: Props) {
  const [id] = useState(newId)
  const { data: lots = [] } = useSWR<LotRow[]>(lotKeys.list, fetcher)
  const [texts, setTexts] = useState<Record<string, string>>({ lot: '' })
  const [meter, setMeter] = useState<MeterDraft>({
    temperature: '25',
    buffers: [
      { buffer: 'phthalate', ph: '', mV: '' },
      { buffer: 'phosphate', ph: '', mV: '' },
    ],
  })
  const [dueOn, setDueOn] = useState(() => addDays(today, holdsDays[instrument.kind] ?? 30))
  const [note, setNote] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const asks = error instanceof ClientError && error.code === 'confirm'
  const fluids = lots.filter((lot) => lot.kind === 'check fluid' && !lot.isUsedUp)
  const part = (key: string, label: string, path: string, unit?: string) => (
    <NumberField
      label={label}
      unit={unit}
      value={texts[key] ?? ''}
      onText={(text) => setTexts((before) => ({ ...before, [key]: text }))}
      error={fields[`check.${path}`]}
      wrap="w-[150px]"
    />
  )

  async function save(isConfirmed: boolean) {
    setBusy(true)
    setError(null)
    try {
      const made = await send<{ result: string; sentence: string }>(calibrationKeys.list, 'POST', {
        id,
        instrumentId: instrument.id,
        dueOn,
        check: checkOf(instrument.kind, texts, meter),
        note,
        isConfirmed,
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
      width={600}
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind={asks ? 'danger-asked' : 'primary'} busy={busy} onClick={() => void save(asks)}>
            {asks ? 'It is so: log it' : 'Log the calibration'}
          </Button>
        </>
      }
    >
      {instrument.kind === 'meter' ? (
        <MeterCheck draft={meter} lots={lots} today={today} fields={fields} onDraft={setMeter} />
      ) : null}
      {instrument.kind === 'viscometer' ? (
        <div className="flex flex-wrap items-start gap-3">
          <Field
            label="Spindle"
            value={texts['spindle'] ?? ''}
            onText={(text) => setTexts((before) => ({ ...before, spindle: text }))}
            error={fields['check.spindle']}
            wrap="w-[150px]"
          />
          {part('rpm', 'Speed', 'rpm', 'rpm')}
          <Select
            label="Check fluid"
            value={texts['lot'] ?? ''}
            empty="by its value"
            options={fluids.map((lot) => ({ value: lot.id, label: `${lot.name}, lot ${lot.lot}` }))}
            onPick={(lot) => setTexts((before) => ({ ...before, lot }))}
            error={fields['check.lotId']}
            wrap="min-w-[200px] flex-1"
          />
          {texts['lot']
            ? part('temperature', 'Fluid at', 'temperatureC', '°C')
            : part('fluid', 'Its value', 'fluidMPas', 'mPa·s')}
          {part('read', 'Reads', 'readMPas', 'mPa·s')}
        </div>
      ) : null}
      {instrument.kind === 'balance' ? (
        <div className="flex flex-wrap items-start gap-3">
          {part('weight', 'Weight', 'weightG', 'g')}
          {part('read', 'Reads', 'readG', 'g')}
        </div>
      ) : null}
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
  meter:
    'Two or three buffers; each has its value at the temperature from its table or its bottle’s certificate.',
  viscometer: 'A check fluid of known viscosity, within 2 % of its value.',
  balance: 'A weight of known mass, within 0.01 g.',
}

function checkOf(kind: string, texts: Record<string, string>, meter: MeterDraft) {
  const number = (key: string) => readTyped(texts[key] ?? '')
  if (kind === 'meter') {
    return {
      kind,
      temperatureC: readTyped(meter.temperature),
      points: meter.buffers
        .filter((one, index) => index < 2 || one.mV.trim() !== '')
        .map((one) => pointOf(one, readTyped)),
    }
  }
  if (kind === 'viscometer') {
    return {
      kind,
      spindle: texts['spindle'] ?? '',
      rpm: number('rpm'),
      ...(texts['lot']
        ? { lotId: texts['lot'], temperatureC: number('temperature') ?? undefined }
        : { fluidMPas: number('fluid') ?? undefined }),
      readMPas: number('read'),
    }
  }
  return { kind, weightG: number('weight'), readG: number('read') }
}
