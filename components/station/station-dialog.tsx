'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readTyped } from '@/lib/number/rules'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { StationPage } from '@/lib/station/queries/stations'
import { stationKeys } from '@/lib/station/keys'

type Station = Omit<StationPage, 'studies'>
type Props = { station: Station | null; nextOrder: number; onClose: () => void; onDone: () => void }

const numbers = [
  'temperatureC',
  'lowC',
  'highC',
  'humidityPercent',
  'lightLux',
  'lightUvWm2',
  'lightHours',
  'cycleLowC',
  'cycleHighC',
  'walkOrder',
  'shelves',
  'placesPerShelf',
] as const
type NumberKey = (typeof numbers)[number]

/** A station as a manager describes it. */
export function StationDialog({ station, nextOrder, onClose, onDone }: Props) {
  const [id] = useState(() => station?.id ?? newId())
  const [name, setName] = useState(station?.name ?? '')
  const [kind, setKind] = useState(station?.kind ?? 'temperature')
  const [caution, setCaution] = useState(station?.caution ?? '')
  const [isActive, setIsActive] = useState(station?.isActive ?? true)
  const [texts, setTexts] = useState(() => startOf(station, nextOrder))
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}

  async function save() {
    setBusy(true)
    setError(null)
    const read = Object.fromEntries(numbers.map((key) => [key, readTyped(texts[key])]))
    const body = {
      ...read,
      ...(kind === 'freeze-thaw'
        ? { temperatureC: null, lowC: null, highC: null }
        : { cycleLowC: null, cycleHighC: null }),
      name,
      kind,
      caution,
    }
    try {
      if (station) {
        await send(stationKeys.one(id), 'PUT', { ...body, version: station.version, isActive })
      } else {
        await send(stationKeys.list, 'POST', { ...body, id })
      }
      toast(station ? `${name} is changed` : `${name} is added`)
      onDone()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  const part = (key: NumberKey, label: string) => (
    <NumberField
      label={label}
      value={texts[key]}
      onText={(text) => setTexts((before) => ({ ...before, [key]: text }))}
      error={fields[key]}
      wrap="w-[128px]"
    />
  )
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={station ? `Change ${station.name}` : 'A new station'}
      width={560}
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={busy} onClick={save}>
            {station ? 'Keep the change' : 'Add it'}
          </Button>
        </>
      }
    >
      <div className="flex flex-wrap items-end gap-3">
        <Field
          label="Name"
          value={name}
          onText={setName}
          error={fields['name']}
          wrap="min-w-[200px] flex-1"
        />
        <Select
          label="Keeps"
          value={kind}
          options={[
            { value: 'temperature', label: 'one temperature' },
            { value: 'freeze-thaw', label: 'freeze-thaw cycles' },
            { value: 'transport', label: 'nothing, it travels' },
          ]}
          onPick={setKind}
          wrap="w-[190px]"
        />
      </div>
      <div className="flex flex-wrap items-start gap-3">
        {kind === 'freeze-thaw' ? (
          <>
            {part('cycleLowC', 'Cold half, °C')}
            {part('cycleHighC', 'Warm half, °C')}
          </>
        ) : (
          <>
            {part('temperatureC', 'Temperature, °C')}
            {part('lowC', 'At least, °C')}
            {part('highC', 'At most, °C')}
            {part('humidityPercent', 'Humidity, %')}
          </>
        )}
      </div>
      <fieldset className="flex flex-wrap items-start gap-3">
        <legend className="mb-1 text-15 font-600">Lamps, where it has any</legend>
        {part('lightLux', 'Light, lux')}
        {part('lightUvWm2', 'UV light, W/m²')}
        {part('lightHours', 'Hours a day')}
      </fieldset>
      <div className="flex flex-wrap items-start gap-3">
        {part('shelves', 'Shelves')}
        {part('placesPerShelf', 'Places on each')}
        {part('walkOrder', 'Order of the walk')}
      </div>
      <Field
        label="What to mind there"
        value={caution}
        onText={setCaution}
        error={fields['caution']}
        hint="Shown at every pull: heat, cracked glass, eye protection. It points to the lab's own procedure."
      />
      {station ? (
        <Checkbox label="In use" checked={isActive} onChange={(event) => setIsActive(event.target.checked)} />
      ) : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}

function startOf(station: Station | null, nextOrder: number): Record<NumberKey, string> {
  const text = (value: number | null | undefined, empty = '') => (value == null ? empty : String(value))
  return {
    temperatureC: text(station?.temperatureC),
    lowC: text(station?.lowC),
    highC: text(station?.highC),
    humidityPercent: text(station?.humidityPercent),
    lightLux: text(station?.lightLux),
    lightUvWm2: text(station?.lightUvWm2),
    lightHours: text(station?.lightHours),
    cycleLowC: text(station?.cycleLowC),
    cycleHighC: text(station?.cycleHighC),
    walkOrder: text(station?.walkOrder, String(nextOrder)),
    shelves: text(station?.shelves, '4'),
    placesPerShelf: text(station?.placesPerShelf, '20'),
  }
}
