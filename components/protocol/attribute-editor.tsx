'use client'

import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { PlannedAttribute, Tolerance } from '@/lib/protocol/schema'
import { attributes as known, type AttributeKey, attributeName } from '@/lib/reading/schema/attributes'
import { BandPreview } from './band-preview'
import { NumberPart } from './number-part'
import { ToleranceFields } from './tolerance-fields'

type Props = {
  attributes: PlannedAttribute[]
  onChange: (attributes: PlannedAttribute[]) => void
  fields: Record<string, string>
}

/** What is measured and how far it may move from where it began. */
export function AttributeEditor({ attributes, onChange, fields }: Props) {
  const change = (index: number, more: Partial<PlannedAttribute>) =>
    onChange(attributes.map((one, at) => (at === index ? { ...one, ...more } : one)))
  const left = Object.values(known).filter((one) => !attributes.some((has) => has.attribute === one.key))
  return (
    <>
      <ul className="divide-y divide-hair border-b border-hair">
        {attributes.map((planned, index) => {
          const label = attributeName(planned.attribute)
          const error = Object.entries(fields).find(([path]) =>
            path.startsWith(`plan.attributes.${index}`),
          )?.[1]
          return (
            <li key={planned.attribute} className="py-3" role="group" aria-label={label}>
              <div className="flex flex-wrap items-end gap-3">
                <b className="w-[120px] pb-1.5 font-650">{label}</b>
                <ToleranceFields
                  tolerance={planned.tolerance}
                  onChange={(tolerance) => change(index, { tolerance })}
                />
                <NumberPart
                  label="Replicates"
                  value={planned.replicates}
                  onNumber={(replicates) => change(index, { replicates })}
                  wrap="w-[100px]"
                />
                <Field
                  label="Method"
                  value={planned.method}
                  onText={(method) => change(index, { method })}
                  wrap="min-w-[220px] flex-1"
                />
                <Button
                  kind="danger"
                  aria-label={`Take out ${label}`}
                  onClick={() => onChange(attributes.filter((_, at) => at !== index))}
                >
                  Take out
                </Button>
              </div>
              {planned.attribute === 'viscosity' ? (
                <div className="mt-3 flex flex-wrap items-end gap-3 sm:ml-[132px]">
                  <Field
                    label="Spindle"
                    value={planned.viscosity?.spindle ?? ''}
                    onText={(spindle) => change(index, { viscosity: { ...viscosityOf(planned), spindle } })}
                    wrap="w-[160px]"
                  />
                  <NumberPart
                    label="Spindle constant"
                    value={viscosityOf(planned).spindleConstant}
                    onNumber={(spindleConstant) =>
                      change(index, { viscosity: { ...viscosityOf(planned), spindleConstant } })
                    }
                    wrap="w-[150px]"
                  />
                  <NumberPart
                    label="rpm"
                    value={viscosityOf(planned).rpm}
                    onNumber={(rpm) => change(index, { viscosity: { ...viscosityOf(planned), rpm } })}
                    wrap="w-[90px]"
                  />
                </div>
              ) : null}
              <BandPreview planned={planned} />
              {error ? (
                <p role="alert" className="mt-1 text-13 text-alarm">
                  {error}
                </p>
              ) : null}
            </li>
          )
        })}
      </ul>
      {left.length > 0 ? (
        <Select
          label="Measure something more"
          hideLabel
          empty="Measure something more"
          value=""
          options={left.map((one) => ({ value: one.key, label: one.label }))}
          onPick={(key) => {
            if (key) onChange([...attributes, { ...fresh, attribute: key as AttributeKey }])
          }}
          wrap="mt-3 w-[240px]"
        />
      ) : null}
    </>
  )
}

const fresh = { tolerance: { kind: 'range', upper: 1 } as Tolerance, replicates: 1, method: '' }

function viscosityOf({ viscosity }: PlannedAttribute) {
  return viscosity ?? { spindle: '', spindleConstant: 10_000, rpm: 10 }
}
