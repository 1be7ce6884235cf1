'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readNumber } from '@/components/ui/read-number'
import { Section } from '@/components/ui/section'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { ClientError, send } from '@/lib/http/fetcher'
import { weeksOfPlan } from '@/lib/protocol/rules/plan'
import { protocolKeys, type PlannedStation, type ProtocolPlan } from '@/lib/protocol/schema'
import { AttributeEditor } from './attribute-editor'
import { PlanGrid } from './plan-grid'
import { StationEditor } from './station-editor'

type Props = {
  code: string
  name: string
  version: { number: number; version: number; plan: ProtocolPlan; note: string }
  onLeave: () => void
  onSaved: () => void
}

/** A draft's plan, edited as a whole and saved as a whole. */
export function PlanEditor({ code, name: savedName, version, onLeave, onSaved }: Props) {
  const [name, setName] = useState(savedName)
  const [note, setNote] = useState(version.note)
  const [plan, setPlan] = useState(version.plan)
  const [week, setWeek] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const set = (change: Partial<ProtocolPlan>) => setPlan((before) => ({ ...before, ...change }))
  const setStation = (index: number, change: Partial<PlannedStation>) =>
    set({ stations: plan.stations.map((one, at) => (at === index ? { ...one, ...change } : one)) })

  async function save() {
    setBusy(true)
    setError(null)
    try {
      await send(protocolKeys.version(code, version.number), 'PUT', {
        version: version.version,
        name,
        plan,
        note,
      })
      toast(`Version ${version.number} of ${code} is kept`)
      onSaved()
    } catch (thrown) {
      setError(thrown)
      setBusy(false)
    }
  }

  function toggle(index: number, at: number) {
    const { timePoints } = plan.stations[index]!
    setStation(index, {
      timePoints: timePoints.includes(at)
        ? timePoints.filter((one) => one !== at)
        : [...timePoints, at].toSorted((a, b) => a - b),
    })
  }

  function addWeek() {
    const at = readNumber(week)
    if (at === null || at <= 0 || weeksOfPlan(plan).includes(at)) return
    set({
      endWeeks: Math.max(plan.endWeeks, at),
      stations: plan.stations.map((station) =>
        station.kind === 'temperature'
          ? { ...station, timePoints: [...station.timePoints, at].toSorted((a, b) => a - b) }
          : station,
      ),
    })
    setWeek('')
  }

  return (
    <>
      <Section title="Stations and time points" sentence="Press a place to put a pull there or take it out.">
        <Field label="Name" value={name} onText={setName} error={fields['name']} wrap="mb-5 max-w-[520px]" />
        <PlanGrid plan={plan} onToggle={toggle} />
        <div className="mt-4 flex flex-wrap items-end gap-3">
          <NumberField label="Another week" value={week} onText={setWeek} wrap="w-[130px]" />
          <Button onClick={addWeek}>Add it at every temperature</Button>
          <NumberPart
            label="Ends in week"
            value={plan.endWeeks}
            onNumber={(endWeeks) => set({ endWeeks })}
            error={fields['plan.endWeeks']}
          />
        </div>
        <StationEditor
          stations={plan.stations}
          setStation={setStation}
          setStations={(stations) => set({ stations })}
        />
      </Section>
      <Section title="Attributes">
        <AttributeEditor
          attributes={plan.attributes}
          onChange={(attributes) => set({ attributes })}
          fields={fields}
        />
      </Section>
      <Section title="Jars and rest">
        <div className="flex flex-wrap items-end gap-3">
          <NumberPart label="Fill, g" value={plan.fillG} onNumber={(fillG) => set({ fillG })} />
          <NumberPart
            label="Fill height, mm"
            value={plan.fillHeightMm}
            onNumber={(fillHeightMm) => set({ fillHeightMm })}
          />
          <NumberPart
            label="Loss, %"
            value={plan.lossPercent}
            onNumber={(lossPercent) => set({ lossPercent })}
          />
          <NumberPart label="Rest, h" value={plan.restHours} onNumber={(restHours) => set({ restHours })} />
          <NumberPart
            label="Initial jars"
            value={plan.initialJars}
            onNumber={(initialJars) => set({ initialJars })}
          />
          <NumberPart label="Retains" value={plan.retains} onNumber={(retains) => set({ retains })} />
          <Field
            label="Pack"
            value={plan.pack}
            onText={(pack) => set({ pack })}
            wrap="min-w-[240px] flex-1"
          />
        </div>
        <TextArea label="Note" value={note} onText={setNote} rows={2} wrap="mt-4 max-w-[720px]" />
      </Section>
      <div className="grid gap-3">
        <ErrorNote error={error} />
        <div className="flex gap-2">
          <Button kind="primary" busy={busy} onClick={save}>
            Keep the plan
          </Button>
          <Button onClick={onLeave}>Leave it as it was</Button>
        </div>
      </div>
    </>
  )
}

/** Keeps the text while it is typed; hands on only what is a number. */
export function NumberPart({
  label,
  value,
  onNumber,
  error,
  wrap = 'w-[110px]',
}: {
  label: string
  value: number
  onNumber: (value: number) => void
  error?: string
  wrap?: string
}) {
  const [text, setText] = useState(String(value))
  return (
    <NumberField
      label={label}
      value={readNumber(text) === value || text === '' || readNumber(text) === null ? text : String(value)}
      onText={(typed, number) => {
        setText(typed)
        if (number !== null) onNumber(number)
      }}
      error={error}
      wrap={wrap}
    />
  )
}
