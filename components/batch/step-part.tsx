'use client'

import { useState } from 'react'
import { conditionsText } from '@/components/formula/read-steps'
import { Empty } from '@/components/ui/empty'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { deviations, stepCautions, stepTimes } from '@/lib/batch/rules/steps'
import { dayAndHour } from './balance-choice'
import { JoiningCurve } from './joining-curve'
import { ReadingsPart } from './readings-part'
import { StepForm } from './step-form'
import type { BatchWork } from './work'

type Step = BatchPage['steps'][number]

/** The process in order: what was prescribed, beside it what was done; the next step is open. */
export function StepPart({ work }: { work: BatchWork }) {
  const { batch } = work
  const isOpen = work.mayWrite && batch.state === 'making'
  const [picked, setPicked] = useState<string | null>(null)
  const current = isOpen
    ? (batch.steps.find((step) => step.id === picked) ?? batch.steps.find((step) => !step.doneAt))
    : undefined
  return (
    <div className="flex flex-col gap-9">
      {batch.steps.length ? (
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
                  {step.lookFor ? <p className="text-17">Look for: {step.lookFor}</p> : null}
                  {stepCautions(step).map((caution) => (
                    <p key={caution} className="text-17 font-650">
                      {caution}
                    </p>
                  ))}
                  {step.doneAt ? <Done step={step} /> : null}
                </div>
                {isOpen && step !== current ? (
                  <button
                    type="button"
                    onClick={() => setPicked(step.id)}
                    className="min-h-16 self-start px-3 text-17 underline underline-offset-4 lg:min-h-11"
                  >
                    {step.doneAt ? 'Correct' : 'Log'}
                    <span className="sr-only"> step {index + 1}</span>
                  </button>
                ) : null}
              </div>
              {step === current ? (
                <div
                  className={`grid gap-6 pb-5 ${isJoining(step) ? 'md:grid-cols-[minmax(0,1fr)_280px]' : ''}`}
                >
                  <StepForm
                    key={`${step.id} ${step.version}`}
                    work={work}
                    step={step}
                    number={index + 1}
                    onDone={() => setPicked(null)}
                  />
                  {isJoining(step) ? <JoiningCurve lines={batch.weighings} minutes={step.minutes} /> : null}
                </div>
              ) : null}
            </li>
          ))}
        </ol>
      ) : (
        <Empty title="No steps are prescribed" sentence="The formula’s version has no process steps." />
      )}
      <ReadingsPart work={work} moment="in process" />
    </div>
  )
}

const isJoining = (step: Step) => /\binto\b/i.test(step.phase)

function Done({ step }: { step: Step }) {
  const actual = conditionsText({
    speedRpm: step.actualSpeedRpm,
    minutes: step.actualMinutes,
    temperatureC: step.actualTemperatureC,
  })
  const otherwise = deviations(step, step)
  const times = stepTimes(step.entries)
  const corrections = step.entries.filter((entry) => entry.reason)
  const paper = step.entries.some((entry) => entry.isFromPaper)
  return (
    <div className="text-15">
      <p>
        <b>Done by {step.doneBy}</b>
        {step.doneAt ? `, ${dayAndHour(step.doneAt)}` : ''}
        {actual ? `: ${actual}` : ''}
        {times.startedAt && times.endedAt
          ? `. Begun ${dayAndHour(times.startedAt)}, ended ${dayAndHour(times.endedAt)}`
          : ''}
        {paper ? '. From paper' : ''}
      </p>
      {otherwise.length ? (
        <p className="text-alarm">
          <b>Otherwise than prescribed:</b> {otherwise.join(', ')}. {step.note}
        </p>
      ) : step.note ? (
        <p>{step.note}</p>
      ) : null}
      {corrections.map((entry) => (
        <p key={entry.id} className="text-soft">
          Corrected by {entry.by}, {dayAndHour(entry.recordedAt)}: {entry.reason}
        </p>
      ))}
    </div>
  )
}
