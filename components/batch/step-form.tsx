'use client'

import { useRef, useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { deviations, stepTimes } from '@/lib/batch/rules/steps'
import { newId } from '@/lib/db/id'
import { readDecimal, readTyped } from '@/lib/number/rules'
import { dayAndHour } from './balance-choice'
import { useEntry } from './use-entry'
import { useKept } from '@/components/device/use-kept'
import type { BatchWork } from './work'

type Props = {
  work: BatchWork
  step: BatchPage['steps'][number]
  number: number
  onDone: () => void
}

/**
 * What was really done; the prescribed values stand as hints and are never filled in by themselves. Who did just that
 * says so with one press, and the record says that it was one.
 */
export function StepForm({ work, step, number, onDone }: Props) {
  const { keep, isSending, fields, refusal } = useEntry(work)
  const [id] = useState(newId)
  const noteField = useRef<HTMLInputElement>(null)
  const [typed, set, forget] = useKept(`batch.${step.id}`, {
    ...{ speed: textOf(step.actualSpeedRpm), minutes: textOf(step.actualMinutes) },
    ...{ temperature: textOf(step.actualTemperatureC), note: step.note, reason: '' },
  })
  const times = stepTimes(step.entries)
  const isRunning = times.startedAt !== null && times.endedAt === null
  // The presses measured it, so an empty field takes their minutes.
  const minutes = typed.minutes || (times.minutes === null ? '' : String(times.minutes))
  const values = {
    actualSpeedRpm: readTyped(typed.speed),
    actualMinutes: readTyped(minutes),
    actualTemperatureC: readTyped(typed.temperature),
  }
  const numbers = {
    actualSpeedRpm: readDecimal(typed.speed),
    actualMinutes: readDecimal(minutes),
    actualTemperatureC: readDecimal(typed.temperature),
  }
  const otherwise = deviations(step, numbers)

  const base = { id, stepId: step.id, version: step.version }
  const press = (kind: 'start' | 'end') =>
    keep({ id, kind: 'steps', name: `Step ${number}, ${kind}`, body: { ...base, kind } })

  async function save(done: typeof values, note: string) {
    const body = { ...base, kind: 'done', ...done, note, reason: typed.reason }
    if (!(await keep({ id, kind: 'steps', name: `Step ${number}`, body }))) return
    forget()
    onDone()
  }

  function submit(event: FormEvent) {
    event.preventDefault()
    if (otherwise.length && !typed.note.trim()) noteField.current?.focus()
    void save(values, typed.note)
  }

  const prescribed = {
    actualSpeedRpm: step.speedRpm,
    actualMinutes: step.minutes,
    actualTemperatureC: step.temperatureC,
  }
  const isUntouched =
    !step.doneAt &&
    times.startedAt === null &&
    Object.values(values).every((value) => value === null) &&
    Object.values(prescribed).some((value) => value !== null)

  const asked = (value: number | null, unit: string) =>
    value === null ? undefined : `asked: ${value} ${unit}`
  return (
    <form onSubmit={submit} noValidate className="grid grid-cols-2 gap-4 sm:grid-cols-3">
      {step.doneAt ? null : (
        <div className="col-span-full flex flex-wrap items-center gap-4">
          <Button busy={isSending} onClick={() => void press(isRunning ? 'end' : 'start')}>
            {isRunning ? `End step ${number}` : `Begin step ${number}`}
          </Button>
          <p role="status" className="text-17">
            {times.startedAt ? `Begun ${dayAndHour(times.startedAt)}` : ''}
            {times.endedAt ? `, ended ${dayAndHour(times.endedAt)}` : isRunning ? ', running' : ''}
          </p>
        </div>
      )}
      <NumberField
        label="Speed"
        unit="rpm"
        value={typed.speed}
        hint={asked(step.speedRpm, 'rpm')}
        error={fields['actualSpeedRpm']}
        onText={(speed) => set({ speed })}
      />
      <NumberField
        label="Time"
        unit="min"
        value={minutes}
        hint={asked(step.minutes, 'min')}
        error={fields['actualMinutes']}
        onText={(text) => set({ minutes: text })}
      />
      <NumberField
        label="Temperature"
        unit="°C"
        value={typed.temperature}
        hint={asked(step.temperatureC, '°C')}
        error={fields['actualTemperatureC']}
        onText={(temperature) => set({ temperature })}
      />
      <Field
        ref={noteField}
        label={otherwise.length ? 'Why it was done otherwise' : 'Note'}
        value={typed.note}
        error={fields['note']}
        hint={otherwise.length ? `${otherwise.join(', ')}.` : undefined}
        onText={(note) => set({ note })}
        wrap="col-span-full"
      />
      {step.doneAt ? (
        <Field
          label="Why the step is corrected"
          value={typed.reason}
          error={fields['reason']}
          hint="What stood before stays on record."
          onText={(reason) => set({ reason })}
          wrap="col-span-full"
        />
      ) : null}
      <div className="col-span-full flex flex-col gap-3">
        <ErrorNote error={refusal} />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" kind="primary" busy={isSending}>
            {step.doneAt ? `Correct step ${number}` : `Step ${number} is done`}
          </Button>
          {isUntouched ? (
            <Button
              busy={isSending}
              onClick={() =>
                void save(prescribed, typed.note.trim() || 'As prescribed, said with one press.')
              }
            >
              Done as prescribed
            </Button>
          ) : null}
        </div>
      </div>
    </form>
  )
}

const textOf = (value: number | null) => (value === null ? '' : String(value))
