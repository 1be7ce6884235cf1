'use client'

import { TakeInitial } from '@/components/batch/take-initial'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { RadioGroup } from '@/components/ui/radio-group'
import { readDecimal } from '@/lib/number/rules'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import type { PlannedAttribute, ProtocolPlan } from '@/lib/protocol/schema'
import { methodText } from '@/lib/reading/rules/conditions'
import { attributeOf, attributeName, readByText, type AttributeKind } from '@/lib/reading/schema/attributes'
import { mean } from '@/lib/science/mean'
import { viscosity } from '@/lib/science/viscosity'
import { shownWithUnit } from '@/lib/study/rules/words'
import { initialAttributes, takenBatches, typedKey, type Draft, type Offer } from './start-state'

type Props = {
  offer: Offer
  draft: Draft
  plan: ProtocolPlan
  set: (change: Partial<Draft>) => void
  fields: Record<string, string>
}

/** How kinds that are no single number are typed. */
const howTyped: Partial<Record<AttributeKind, string>> = {
  type: 'water outside, or oil outside',
  colour: 'L*, a* and b*: 72.4 1.2 14.8',
  droplets: '2.5 × 12; 3.5 × 30; 4.1',
  centrifuge: 'none, trace, or the layer in mm',
}

/** The readings that every band is told from, per batch, as they are typed. */
export function InitialFields({ offer, draft, plan, set, fields }: Props) {
  const attributes = initialAttributes(plan)
  if (attributes.length === 0) return null
  const batches = offer.batches.filter((batch) => takenBatches(draft).includes(batch.id))
  return (
    <Section
      title="Initial readings"
      sentence="Bands are told from these. Separation, mass and what is said in words start from nothing."
    >
      <div className="grid gap-6">
        {attributes.map((planned) => (
          <div key={planned.attribute} className="grid gap-3">
            <div className="flex flex-wrap items-end justify-between gap-3">
              <p>
                <b className="font-650">{attributeName(planned.attribute)}</b>
                <span className="block text-13 text-soft">{methodText(planned)}</span>
              </p>
              <InstrumentChoice planned={planned} offer={offer} draft={draft} set={set} />
            </div>
            {planned.viscosity ? (
              <RadioGroup
                label="Viscosity is typed as"
                hideLabel
                value={draft.isTorque ? 'torque' : 'value'}
                onPick={(kind) => set({ isTorque: kind === 'torque' })}
                options={[
                  {
                    value: 'torque',
                    label: `Torque %, ${planned.viscosity.spindle}, ${planned.viscosity.rpm} rpm`,
                  },
                  { value: 'value', label: 'mPa·s' },
                ]}
              />
            ) : null}
            {batches.map((batch) => (
              <div key={batch.id} className="flex flex-wrap items-end gap-3">
                {Array.from({ length: planned.replicates }, (_, place) => {
                  const key = typedKey(batch.id, planned.attribute)
                  const texts = draft.typed[key] ?? []
                  const { kind, unit } = attributeOf(planned.attribute, planned)
                  const Typed = readByText.has(kind) ? Field : NumberField
                  return (
                    <Typed
                      key={place}
                      placeholder={howTyped[kind]}
                      label={`${attributeName(planned.attribute)} of ${batch.code}${planned.replicates > 1 ? `, replicate ${place + 1}` : ''}`}
                      value={texts[place] ?? ''}
                      unit={planned.viscosity && draft.isTorque ? '%' : unit}
                      onText={(text) =>
                        set({
                          typed: {
                            ...draft.typed,
                            [key]: Array.from({ length: planned.replicates }, (_, index) =>
                              index === place ? text : (texts[index] ?? ''),
                            ),
                          },
                        })
                      }
                      error={errorOf(fields, draft, plan, batch.id, planned.attribute)}
                      wrap={readByText.has(kind) ? 'w-[260px]' : 'w-[170px]'}
                    />
                  )
                })}
                <Computed
                  planned={planned}
                  draft={draft}
                  texts={draft.typed[typedKey(batch.id, planned.attribute)]}
                />
                <TakeInitial
                  batchCode={batch.code}
                  asked={{
                    attribute: planned.attribute,
                    torque: planned.viscosity && draft.isTorque ? planned.viscosity : null,
                    replicates: planned.replicates,
                  }}
                  onTake={({ texts, instrumentId }) =>
                    set({
                      typed: { ...draft.typed, [typedKey(batch.id, planned.attribute)]: texts },
                      ...(instrumentId
                        ? { instrumentIds: { ...draft.instrumentIds, [planned.attribute]: instrumentId } }
                        : {}),
                    })
                  }
                />
              </div>
            ))}
          </div>
        ))}
      </div>
    </Section>
  )
}

function InstrumentChoice({
  planned,
  offer,
  draft,
  set,
}: Omit<Props, 'plan' | 'fields'> & { planned: PlannedAttribute }) {
  const kind = planned.attribute === 'ph' ? 'meter' : planned.attribute === 'viscosity' ? 'viscometer' : null
  const instruments = offer.instruments.filter((one) => one.kind === kind && one.isActive)
  if (instruments.length === 0) return null
  return (
    <Select
      label={`Instrument for ${attributeName(planned.attribute)}`}
      hideLabel
      empty="Which instrument"
      value={draft.instrumentIds[planned.attribute] ?? ''}
      options={instruments.map((one) => ({ value: one.id, label: `${one.code}, ${one.name}` }))}
      onPick={(id) => set({ instrumentIds: { ...draft.instrumentIds, [planned.attribute]: id } })}
      wrap="w-[220px]"
    />
  )
}

/** Torque becomes mPa·s while it is typed. */
function Computed({ planned, draft, texts }: { planned: PlannedAttribute; draft: Draft; texts?: string[] }) {
  if (!planned.viscosity || !draft.isTorque) return null
  const torques = (texts ?? []).map(readDecimal).filter((value) => value !== null)
  if (torques.length === 0) return null
  const torquePercent = mean(torques)
  if (torquePercent <= 0) return null
  const { mPas } = viscosity({ torquePercent, ...planned.viscosity })
  return <p className="pb-1.5 font-600">{shownWithUnit(attributeOf('viscosity'), mPas)}</p>
}

/** The server names a reading by its place in what was sent. */
function errorOf(
  fields: Record<string, string>,
  draft: Draft,
  plan: ProtocolPlan,
  batchId: string,
  attribute: string,
): string | undefined {
  const sent = takenBatches(draft).flatMap((id) =>
    initialAttributes(plan)
      .filter((one) => (draft.typed[typedKey(id, one.attribute)] ?? []).some((text) => text.trim() !== ''))
      .map((one) => typedKey(id, one.attribute)),
  )
  const index = sent.indexOf(typedKey(batchId, attribute))
  const path = Object.keys(fields).find((field) => field.startsWith(`initialReadings.${index}.`))
  return path ? fields[path] : undefined
}
