'use client'

import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import type { PlannedAttribute, Tolerance } from '@/lib/protocol/schema'
import { attributes as known, attributeOf, type AttributeKey } from '@/lib/reading/schema/attributes'
import { useState } from 'react'
import { NumberPart } from './plan-editor'

type Props = {
  attributes: PlannedAttribute[]
  onChange: (attributes: PlannedAttribute[]) => void
  fields: Record<string, string>
}

const kinds = [
  { value: 'range', label: 'between limits' },
  { value: 'percent', label: '% of the initial' },
  { value: 'shift', label: 'units from the initial' },
]

/** What is measured and how far it may move from where it began. */
export function AttributeEditor({ attributes, onChange, fields }: Props) {
  const change = (index: number, more: Partial<PlannedAttribute>) =>
    onChange(attributes.map((one, at) => (at === index ? { ...one, ...more } : one)))
  const left = Object.values(known).filter((one) => !attributes.some((has) => has.attribute === one.key))
  return (
    <>
      <ul className="divide-y divide-hair border-b border-hair">
        {attributes.map((planned, index) => {
          const { label } = attributeOf(planned.attribute)
          const error = Object.entries(fields).find(([path]) =>
            path.startsWith(`plan.attributes.${index}`),
          )?.[1]
          return (
            <li key={planned.attribute} className="py-3" role="group" aria-label={label}>
              <div className="flex flex-wrap items-end gap-3">
                <b className="w-[120px] pb-1.5 font-650">{label}</b>
                <Select
                  label="Tolerance"
                  value={planned.tolerance.kind}
                  options={kinds}
                  onPick={(kind) => change(index, { tolerance: emptyTolerance(kind) })}
                  wrap="w-[190px]"
                />
                <Limits
                  key={planned.tolerance.kind}
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

function emptyTolerance(kind: string): Tolerance {
  if (kind === 'range') return { kind: 'range', upper: 1 }
  return kind === 'percent'
    ? { kind: 'percent', below: 20, above: 20 }
    : { kind: 'shift', below: 0.3, above: 0.3 }
}

function viscosityOf({ viscosity }: PlannedAttribute) {
  return viscosity ?? { spindle: '', spindleConstant: 10_000, rpm: 10 }
}

/** Two sides, either of which may stay empty: that side is then open. */
function Limits({ tolerance, onChange }: { tolerance: Tolerance; onChange: (tolerance: Tolerance) => void }) {
  const [low, high] =
    tolerance.kind === 'range' ? [tolerance.lower, tolerance.upper] : [tolerance.below, tolerance.above]
  const [texts, setTexts] = useState({ low: text(low), high: text(high) })
  const names = tolerance.kind === 'range' ? ['from', 'to'] : ['below', 'above']

  function write(side: 'low' | 'high', typed: string, number: number | null) {
    setTexts((before) => ({ ...before, [side]: typed }))
    if (number === null && typed.trim() !== '') return
    const value = number ?? undefined
    const sides = { low, high, [side]: value }
    onChange(
      tolerance.kind === 'range'
        ? { kind: 'range', ...given('lower', sides.low), ...given('upper', sides.high) }
        : { kind: tolerance.kind, ...given('below', sides.low), ...given('above', sides.high) },
    )
  }

  return (
    <>
      <NumberField
        label={names[0]}
        value={texts.low}
        onText={(typed, number) => write('low', typed, number)}
        wrap="w-[90px]"
      />
      <NumberField
        label={names[1]}
        value={texts.high}
        onText={(typed, number) => write('high', typed, number)}
        wrap="w-[90px]"
      />
    </>
  )
}

function text(value: number | undefined): string {
  return value === undefined ? '' : String(value)
}

function given<K extends string>(key: K, value: number | undefined): { [P in K]?: number } {
  return value === undefined ? {} : ({ [key]: value } as { [P in K]?: number })
}
