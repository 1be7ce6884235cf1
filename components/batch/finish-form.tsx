'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Section } from '@/components/ui/section'
import { gramsText } from '@/lib/batch/rules/weighing'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { readTyped } from '@/lib/number/rules'
import { totalGrams } from '@/lib/science/making'
import { useAct } from './use-act'

type Props = { batch: BatchPage; onSaved: () => void }

/** The end of making: what came out, and into which jars it goes. */
export function FinishForm({ batch, onSaved }: Props) {
  const { act, isSending, fields, refusal } = useAct(`/api/batches/${batch.code}/finish`, onSaved)
  const [typed, setTyped] = useState({ yield: '', fill: '', closure: '' })
  const set = (change: Partial<typeof typed>) => setTyped((now) => ({ ...now, ...change }))
  const weighedG = totalGrams(batch.weighings.map((line) => line.actualG ?? 0))
  const toWeigh = batch.weighings.filter((line) => line.actualG === null).length
  const toDo = batch.steps.filter((step) => !step.doneAt).length
  const why =
    toWeigh || toDo
      ? `${[toWeigh ? `${toWeigh} to weigh` : '', toDo ? `${toDo} steps to do` : ''].filter(Boolean).join(', ')} first.`
      : undefined
  return (
    <Section title="Yield" sentence={`${gramsText(weighedG)} g went in. After this it rests 24 to 72 h.`}>
      <form
        noValidate
        className="grid max-w-[640px] gap-4 sm:grid-cols-2"
        onSubmit={(event) => {
          event.preventDefault()
          const { version } = batch
          void act({
            version,
            yieldG: readTyped(typed.yield),
            fillG: readTyped(typed.fill),
            closure: typed.closure,
          })
        }}
      >
        <NumberField
          label="Yield"
          unit="g"
          value={typed.yield}
          error={fields['yieldG']}
          onText={(text) => set({ yield: text })}
        />
        <NumberField
          label="Fill of a jar"
          unit="g"
          value={typed.fill}
          error={fields['fillG']}
          hint="May be left out."
          onText={(fill) => set({ fill })}
        />
        <Field
          label="Jar and closure"
          value={typed.closure}
          error={fields['closure']}
          onText={(closure) => set({ closure })}
          wrap="sm:col-span-2"
        />
        <div className="flex flex-col gap-3 sm:col-span-2">
          <ErrorNote error={refusal} />
          <div>
            <Button type="submit" kind="primary" busy={isSending} why={why}>
              Made, let it rest
            </Button>
          </div>
        </div>
      </form>
    </Section>
  )
}
