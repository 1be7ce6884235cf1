'use client'

import { useState } from 'react'
import { conditionsText } from '@/components/formula/read-steps'
import { Empty } from '@/components/ui/empty'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { JoiningCurve } from './joining-curve'
import { StepForm } from './step-form'

type Props = { batch: BatchPage; mayWrite: boolean; onSaved: () => Promise<unknown> }
type Step = BatchPage['steps'][number]

/** The process in order: what was prescribed, beside it what was done; the next step is open. */
export function StepPart({ batch, mayWrite, onSaved }: Props) {
  const isOpen = mayWrite && batch.state === 'making'
  const [picked, setPicked] = useState<string | null>(null)
  const current = isOpen
    ? (batch.steps.find((step) => step.id === picked) ?? batch.steps.find((step) => !step.doneAt))
    : undefined
  if (!batch.steps.length) {
    return <Empty title="No steps are prescribed" sentence="The formula’s version has no process steps." />
  }
  return (
    <ol className="max-w-[980px]">
      {batch.steps.map((step, index) => (
        <li
          key={step.id}
          className={`border-b border-hair ${step === current ? '-mx-4 bg-typed px-4 sm:-mx-7 sm:px-7' : ''}`}
        >
          <div className="flex gap-4 py-3">
            <span className="w-7 shrink-0 text-20 font-750">{index + 1}</span>
            <div className="min-w-0 flex-1">
              <p className="text-17">
                {step.phase ? <b>{step.phase}. </b> : null}
                {step.instruction}
              </p>
              <p className="text-15 text-soft">{conditionsText(step) || 'No conditions prescribed'}</p>
              {step.caution ? <p className="text-16 font-650">{step.caution}</p> : null}
              {step.doneAt ? <Done step={step} /> : null}
            </div>
            {isOpen && step !== current ? (
              <button
                type="button"
                onClick={() => setPicked(step.id)}
                className="min-h-[var(--hit)] self-start px-2 underline underline-offset-4"
              >
                {step.doneAt ? 'Correct' : 'Log'}
                <span className="sr-only"> step {index + 1}</span>
              </button>
            ) : null}
          </div>
          {step === current ? (
            <div className="grid gap-6 pb-5 md:grid-cols-[minmax(0,1fr)_280px]">
              <StepForm
                key={`${step.id} ${step.version}`}
                code={batch.code}
                step={step}
                number={index + 1}
                onSaved={() => {
                  setPicked(null)
                  void onSaved()
                }}
              />
              {/\binto\b/i.test(step.phase) ? (
                <JoiningCurve lines={batch.weighings} minutes={step.minutes} />
              ) : null}
            </div>
          ) : null}
        </li>
      ))}
    </ol>
  )
}

function Done({ step }: { step: Step }) {
  const actual = conditionsText({
    speedRpm: step.actualSpeedRpm,
    minutes: step.actualMinutes,
    temperatureC: step.actualTemperatureC,
  })
  return (
    <p className="text-15">
      <b>Done by {step.doneBy}</b>
      {actual ? `: ${actual}` : ''}
      {step.note ? `. ${step.note}` : ''}
    </p>
  )
}
