'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Section } from '@/components/ui/section'
import { Select } from '@/components/ui/select'
import { isTypeAsStated } from '@/lib/batch/rules/finding'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { typesFound, typeTestMethods } from '@/lib/batch/schema'
import { readDecimal } from '@/lib/number/rules'
import { useAct } from './use-act'

type Props = { batch: BatchPage; onSaved: () => void }

/** Which phase is outside: dilution, conductivity or dye. Against the design it asks what one makes of it. */
export function TypeTestForm({ batch, onSaved }: Props) {
  const { act, isSending, fields, refusal } = useAct(`/api/batches/${batch.code}/type-test`, onSaved)
  const [typed, setTyped] = useState({ method: '', found: '', conductivity: '', reason: '' })
  const set = (change: Partial<typeof typed>) => setTyped((now) => ({ ...now, ...change }))
  const isAgain = batch.emulsionTypeFound !== null
  const isAgainst = typed.found !== '' && !isTypeAsStated(batch.emulsionType, typed.found)
  return (
    <Section title="Emulsion type" sentence={`Designed ${batch.emulsionType}. ${toldBy[typed.method] ?? ''}`}>
      <form
        noValidate
        className="grid max-w-[640px] gap-4 sm:grid-cols-2"
        onSubmit={(event) => {
          event.preventDefault()
          const conductivityUsCm = typed.conductivity.trim()
            ? (readDecimal(typed.conductivity) ?? typed.conductivity)
            : null
          const { method, found, reason } = typed
          void act({ version: batch.version, method, found, conductivityUsCm, reason })
        }}
      >
        <Select
          label="Tested by"
          empty="Choose"
          value={typed.method}
          error={fields['method']}
          options={typeTestMethods.map((method) => ({ value: method, label: method }))}
          onPick={(method) => set({ method })}
        />
        <Select
          label="It showed"
          empty="Choose"
          value={typed.found}
          error={fields['found']}
          options={typesFound.map((type) => ({ value: type, label: type }))}
          onPick={(found) => set({ found })}
        />
        {typed.method === 'conductivity' ? (
          <NumberField
            label="Conductivity"
            unit="microsiemens per cm"
            value={typed.conductivity}
            error={fields['conductivityUsCm']}
            onText={(conductivity) => set({ conductivity })}
            wrap="sm:col-span-2"
          />
        ) : null}
        {isAgainst || isAgain ? (
          <Field
            label={isAgainst ? 'What you make of it' : 'Why the result is corrected'}
            value={typed.reason}
            error={fields['reason']}
            hint={isAgainst ? `It was designed ${batch.emulsionType}.` : 'The first result stays on record.'}
            onText={(reason) => set({ reason })}
            wrap="sm:col-span-2"
          />
        ) : null}
        <div className="flex flex-col gap-3 sm:col-span-2">
          <ErrorNote error={refusal} />
          <div>
            <Button type="submit" kind={isAgain ? 'secondary' : 'primary'} busy={isSending}>
              {isAgain ? 'Correct the result' : 'Keep the result'}
            </Button>
          </div>
        </div>
      </form>
    </Section>
  )
}

const toldBy: Record<string, string> = {
  dilution: 'A drop spreads in whatever is outside.',
  conductivity: 'Water outside conducts; oil outside hardly does, under 1 microsiemens per cm.',
  dye: 'The dye runs through the phase that it dissolves in when that one is outside.',
}
