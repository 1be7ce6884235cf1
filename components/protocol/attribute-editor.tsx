'use client'

import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { freshAttribute } from '@/lib/protocol/rules/fresh-attribute'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributes as known, type KnownKey, attributeName } from '@/lib/reading/schema/attributes'
import { AttributeConditions } from './attribute-conditions'
import { BandPreview } from './band-preview'
import { NumberPart } from './number-part'
import { AddOwn, OwnDefinition } from './own-attribute'
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
                {planned.own?.kind === 'scale' ? null : (
                  <ToleranceFields
                    tolerance={planned.tolerance}
                    onChange={(tolerance) => change(index, { tolerance })}
                  />
                )}
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
              {planned.own ? (
                <OwnDefinition
                  own={planned.own}
                  tolerance={planned.tolerance}
                  onChange={(more) => change(index, more)}
                />
              ) : null}
              <AttributeConditions planned={planned} onChange={(more) => change(index, more)} />
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
            if (key) onChange([...attributes, freshAttribute(key as KnownKey)])
          }}
          wrap="mt-3 w-[240px]"
        />
      ) : null}
      <AddOwn
        taken={attributes.map(({ attribute }) => attribute)}
        onAdd={(planned) => onChange([...attributes, planned])}
      />
    </>
  )
}
