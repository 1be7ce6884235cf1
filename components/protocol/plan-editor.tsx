'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { readDecimal } from '@/lib/number/rules'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { ClientError, send } from '@/lib/http/fetcher'
import { planFaults } from '@/lib/protocol/rules/faults'
import { matrixed } from '@/lib/protocol/rules/matrixing'
import { askedAt, weeksOfPlan } from '@/lib/protocol/rules/plan'
import { protocolKeys } from '@/lib/protocol/keys'
import { outsideTests, type PlannedStation, type ProtocolPlan } from '@/lib/protocol/schema'
import { type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { AttributeEditor } from './attribute-editor'
import { PlanGrid } from './plan-grid'
import { NumberPart } from './number-part'
import { WeighingTolerance } from './weighing-tolerance'
import { ReadLess } from './read-less'
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
  const [reads, setReads] = useState<AttributeKey | undefined>()
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const set = (change: Partial<ProtocolPlan>) => setPlan((before) => ({ ...before, ...change }))
  const setStation = (index: number, change: Partial<PlannedStation>) =>
    set({ stations: plan.stations.map((one, at) => (at === index ? { ...one, ...change } : one)) })
  /** Other time points have other middle ones among them. */
  const setTimes = (change: Partial<ProtocolPlan>) => {
    const next = { ...plan, ...change }
    setPlan(next.matrixing ? matrixed(next, next.matrixing.attributes) : next)
  }
  const faults = planFaults(plan)

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
    if (reads) return toggleReading(index, at, reads)
    const { timePoints } = plan.stations[index]!
    const toggled = timePoints.includes(at)
      ? timePoints.filter((one) => one !== at)
      : [...timePoints, at].toSorted((a, b) => a - b)
    setTimes({
      stations: plan.stations.map((one, other) => (other === index ? { ...one, timePoints: toggled } : one)),
    })
  }

  function toggleReading(index: number, at: number, attribute: AttributeKey) {
    const station = plan.stations[index]!
    const isRead = askedAt(plan, station, at).some((one) => one.attribute === attribute)
    const others = (station.leftOut ?? []).filter((one) => one.week !== at || one.attribute !== attribute)
    setStation(index, { leftOut: isRead ? [...others, { attribute, week: at }] : others })
  }

  function setAside(what: (typeof outsideTests)[number], jars: number) {
    const others = (plan.setAside ?? []).filter((one) => one.what !== what)
    const all = jars > 0 ? [...others, { what, jars }] : others
    set({ setAside: all.length > 0 ? all : undefined })
  }

  function addWeek() {
    const at = readDecimal(week)
    if (at === null || at <= 0 || weeksOfPlan(plan).includes(at)) return
    setTimes({
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
        <Select
          label="Show where is read"
          empty="every jar that is pulled"
          value={reads ?? ''}
          options={plan.attributes.map(({ attribute }) => ({
            value: attribute,
            label: `only ${attributeName(attribute)}`,
          }))}
          onPick={(key) => setReads((key || undefined) as AttributeKey | undefined)}
          wrap="mb-3 w-[240px]"
        />
        <PlanGrid plan={plan} reads={reads} onToggle={toggle} />
        {plan.stations.length === 0 ? (
          <p className="mt-2 text-14 text-soft">
            {faults.find(({ path }) => path === 'plan.stations')?.sentence}
          </p>
        ) : null}
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
          setStations={(stations) => setTimes({ stations })}
          faults={faults}
          fields={fields}
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
          <WeighingTolerance plan={plan} onSet={set} error={fields['plan.weighingTolerancePercent']} />
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
        <div className="mt-3 flex flex-wrap items-end gap-3">
          {outsideTests.map((what) => (
            <NumberPart
              key={what}
              label={`Jars for ${what}`}
              value={plan.setAside?.find((one) => one.what === what)?.jars ?? 0}
              onNumber={(jars) => setAside(what, jars)}
              error={fields['plan.setAside']}
              wrap="w-[200px]"
            />
          ))}
          <Field
            label="The product's own pack"
            placeholder="airless pump, 30 mL"
            value={plan.ownPack ?? ''}
            onText={(ownPack) => set({ ownPack: ownPack || undefined })}
            wrap="min-w-[240px] flex-1"
          />
        </div>
        <TextArea label="Note" value={note} onText={setNote} rows={2} wrap="mt-4 max-w-[720px]" />
      </Section>
      <Section title="Read less" sentence="Fewer readings and grams, and what is given up for them.">
        <ReadLess plan={plan} onChange={setPlan} fields={fields} />
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
