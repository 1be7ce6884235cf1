'use client'

import { useState } from 'react'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { paths, phMethods } from '@/lib/reading/rules/conditions'

type Props = { planned: PlannedAttribute; onChange: (more: Partial<PlannedAttribute>) => void }
type Said = NonNullable<PlannedAttribute['conditions']>

/** Under which pH and viscosity are read, now and at every pull; empty where the protocol leaves it open. */
export function ReadingConditions({ planned, onChange }: Props) {
  const said: Said = planned.conditions ?? {}
  function set(more: Said) {
    const all = Object.entries({ ...said, ...more }).filter(
      ([, value]) => value !== undefined && value !== '',
    )
    onChange({ conditions: all.length === 0 ? undefined : (Object.fromEntries(all) as Said) })
  }
  return (
    <>
      {planned.attribute === 'viscosity' ? (
        <>
          <Field
            label="Spring"
            value={said.spring ?? ''}
            onText={(spring) => set({ spring })}
            wrap="w-[110px]"
          />
          <Figure label="Read after, s" value={said.seconds} onSet={(seconds) => set({ seconds })} />
          <Select
            label="Path"
            empty="not said"
            value={said.path ?? ''}
            options={paths.map((one) => ({ value: one, label: one }))}
            onPick={(picked) => set({ path: paths.find((one) => one === picked) })}
            wrap="w-[140px]"
          />
          <Figure label="Rest, min" value={said.restMinutes} onSet={(restMinutes) => set({ restMinutes })} />
        </>
      ) : (
        <Select
          label="Read"
          empty="not said"
          value={said.phMethod ?? ''}
          options={phMethods.map((one) => ({ value: one, label: one }))}
          onPick={(picked) =>
            set({
              phMethod: phMethods.find((one) => one === picked),
              ...(picked === 'extract' ? {} : { extractParts: undefined, extractMinutes: undefined }),
            })
          }
          wrap="w-[180px]"
        />
      )}
      {said.phMethod === 'extract' ? (
        <>
          <Figure
            label="1 part to"
            value={said.extractParts}
            onSet={(extractParts) => set({ extractParts })}
          />
          <Figure
            label="Stands, min"
            value={said.extractMinutes}
            onSet={(extractMinutes) => set({ extractMinutes })}
          />
        </>
      ) : null}
      <Figure
        label="Sample, °C"
        value={said.sampleTemperatureC}
        onSet={(sampleTemperatureC) => set({ sampleTemperatureC })}
      />
    </>
  )
}

type FigureProps = { label: string; value: number | undefined; onSet: (value: number | undefined) => void }

/** A number or nothing; text that is neither stays in sight and is not handed on. */
function Figure({ label, value, onSet }: FigureProps) {
  const [text, setText] = useState(String(value ?? ''))
  return (
    <NumberField
      label={label}
      value={text}
      onText={(typed, number) => {
        setText(typed)
        if (number !== null || typed.trim() === '') onSet(number ?? undefined)
      }}
      wrap="w-[110px]"
    />
  )
}
