'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { useSWRConfig } from 'swr'
import { ToleranceFields } from '@/components/protocol/tolerance-fields'
import { Button } from '@/components/ui/button'
import { Checkbox } from '@/components/ui/checkbox'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { RadioGroup } from '@/components/ui/radio-group'
import { readDecimal } from '@/lib/number/rules'
import { Select } from '@/components/ui/select'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { toleranceText } from '@/lib/protocol/rules/words'
import type { Tolerance } from '@/lib/protocol/schema'
import { attributeName } from '@/lib/reading/schema/attributes'
import type { StudyStationRow } from '@/lib/study/queries/head'
import type { ShownStudy } from '@/lib/study/queries/sheet'
import { degrees } from '@/lib/study/rules/finding'
import { withVariant } from '@/lib/study/rules/words'
import { studyKeys } from '@/lib/study/keys'
import type { Amendment } from '@/lib/study/schema'

type Props = { study: ShownStudy; stations: StudyStationRow[]; onClose: () => void }
type Kind = Amendment['kind']

const kinds = [
  { value: 'time point', label: 'Add a time point at a station' },
  { value: 'retain', label: 'Pull a retain' },
  { value: 'station end', label: 'End early at a station' },
  { value: 'tolerance', label: 'Change a tolerance' },
]
const meanings: Record<Kind, string> = {
  'time point': 'Watch jars are looked at; a measurement opens a spare jar of each batch.',
  retain: 'The jar counts as spent. Nothing read of it enters a series, because it stood at no station.',
  'station end': 'What is due there is not pulled, and its jars are kept. What was read stays.',
  tolerance: 'The series are judged anew from the same readings, and flags with them.',
}

/** One change to a running study's plan, with its reason; it stays on the sheet. */
export function AmendDialog({ study, stations, onClose }: Props) {
  const router = useRouter()
  const { mutate } = useSWRConfig()
  const running = stations.filter((station) => station.endedOn === null)
  const [id] = useState(newId)
  const [kind, setKind] = useState<Kind>('time point')
  const [stationId, setStationId] = useState(running[0]?.id ?? '')
  const [week, setWeek] = useState('')
  const [isMeasured, setIsMeasured] = useState(true)
  const [jarCode, setJarCode] = useState('')
  const [attribute, setAttribute] = useState(study.attributes[0]!.attribute)
  const [tolerance, setTolerance] = useState<Tolerance>(study.attributes[0]!.tolerance)
  const [reason, setReason] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const planned = study.attributes.find((one) => one.attribute === attribute)!

  function body(): Amendment {
    const shared = { id, version: study.version, reason }
    switch (kind) {
      case 'time point':
        return { kind, ...shared, studyStationId: stationId, week: readDecimal(week) ?? 0, isMeasured }
      case 'retain':
        return { kind, ...shared, jarCode }
      case 'station end':
        return { kind, ...shared, studyStationId: stationId }
      case 'tolerance':
        return { kind, ...shared, attribute, tolerance }
    }
  }

  async function amend() {
    setBusy(true)
    setError(null)
    try {
      const made = await send<{ number: number }>(studyKeys.amendments(study.code), 'POST', body())
      await mutate(studyKeys.sheet(study.code))
      router.refresh()
      toast(`Amendment ${made.number} of ${study.code} is written down`)
      onClose()
    } catch (thrown) {
      setError(thrown)
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Amend ${study.code}`}
      sentence="It holds from now on and stays on the sheet with its reason; nothing that was read changes."
      width={620}
      acts={
        <>
          <Button onClick={onClose}>Leave it as it is</Button>
          <Button kind={kind === 'station end' ? 'danger-asked' : 'primary'} busy={busy} onClick={amend}>
            Amend it
          </Button>
        </>
      }
    >
      <RadioGroup
        label="What changes"
        layout="ledger"
        value={kind}
        onPick={(value) => {
          setKind(value as Kind)
          setError(null)
        }}
        options={kinds}
      />
      <p className="text-15 text-soft">{meanings[kind]}</p>
      {kind === 'time point' || kind === 'station end' ? (
        <Select
          label="Station"
          value={stationId}
          options={running.map((one) => ({ value: one.id, label: stationLabel(one) }))}
          onPick={setStationId}
        />
      ) : null}
      {kind === 'time point' ? (
        <div className="flex flex-wrap items-end gap-4">
          <NumberField label="Week" value={week} onText={setWeek} error={fields['week']} wrap="w-[200px]" />
          <Checkbox label="Measure too" checked={isMeasured} onSet={setIsMeasured} />
        </div>
      ) : null}
      {kind === 'retain' ? (
        <Field
          label="Code on the retain's label"
          value={jarCode}
          onText={setJarCode}
          error={fields['jarCode']}
        />
      ) : null}
      {kind === 'tolerance' ? (
        <>
          <Select
            label="Attribute"
            value={attribute}
            options={study.attributes.map((one) => ({
              value: one.attribute,
              label: `${attributeName(one.attribute)}, ${toleranceText(one)}`,
            }))}
            onPick={(key) => {
              const picked = study.attributes.find((one) => one.attribute === key)!
              setAttribute(picked.attribute)
              setTolerance(picked.tolerance)
            }}
          />
          <div key={attribute} className="flex flex-wrap items-end gap-3">
            <ToleranceFields tolerance={tolerance} onChange={setTolerance} />
          </div>
          <p className="text-15" aria-live="polite">
            {attributeName(attribute)} may be {toleranceText({ ...planned, tolerance })}.
          </p>
        </>
      ) : null}
      <TextArea label="Reason" value={reason} onText={setReason} rows={2} error={fields['reason']} />
      <ErrorNote error={error} />
    </Dialog>
  )
}

function stationLabel({ kind, temperatureC, name, variant }: StudyStationRow): string {
  const what =
    kind === 'freeze-thaw' ? 'Freeze-thaw' : kind === 'transport' ? 'On the road' : degrees(temperatureC)
  return `${withVariant(what, variant)}, ${name}`
}
