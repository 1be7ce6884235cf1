'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { readDecimal } from '@/lib/formula/rules/numbers'
import { ClientError, send } from '@/lib/http/fetcher'

type Props = { code: string; step: BatchPage['steps'][number]; number: number; onSaved: () => void }

/** What was really done; the prescribed values stand as hints and are never filled in by themselves. */
export function StepForm({ code, step, number, onSaved }: Props) {
  const [typed, setTyped] = useState(() => ({
    speed: textOf(step.actualSpeedRpm),
    minutes: textOf(step.actualMinutes),
    temperature: textOf(step.actualTemperatureC),
    note: step.note,
    reason: '',
  }))
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)
  const set = (change: Partial<typeof typed>) => setTyped((now) => ({ ...now, ...change }))

  async function save(event: FormEvent) {
    event.preventDefault()
    setRefusal(null)
    setIsSending(true)
    try {
      await send(`/api/batches/${encodeURIComponent(code)}/steps`, 'PUT', {
        stepId: step.id,
        version: step.version,
        actualSpeedRpm: valueOf(typed.speed),
        actualMinutes: valueOf(typed.minutes),
        actualTemperatureC: valueOf(typed.temperature),
        note: typed.note,
        reason: typed.reason,
      })
      onSaved()
    } catch (thrown) {
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    } finally {
      setIsSending(false)
    }
  }

  const asked = (value: number | null, unit: string) =>
    value === null ? undefined : `asked: ${value} ${unit}`
  const field = (name: string) => refusal?.fields[name]
  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid grid-cols-2 gap-4 sm:grid-cols-3">
      <NumberField
        label="Speed"
        unit="rpm"
        value={typed.speed}
        hint={asked(step.speedRpm, 'rpm')}
        error={field('actualSpeedRpm')}
        onText={(speed) => set({ speed })}
      />
      <NumberField
        label="Time"
        unit="min"
        value={typed.minutes}
        hint={asked(step.minutes, 'min')}
        error={field('actualMinutes')}
        onText={(minutes) => set({ minutes })}
      />
      <NumberField
        label="Temperature"
        unit="°C"
        value={typed.temperature}
        hint={asked(step.temperatureC, '°C')}
        error={field('actualTemperatureC')}
        onText={(temperature) => set({ temperature })}
      />
      <Field
        label="Note"
        value={typed.note}
        error={field('note')}
        onText={(note) => set({ note })}
        wrap="col-span-full"
      />
      {step.doneAt ? (
        <Field
          label="Why the step is corrected"
          value={typed.reason}
          error={field('reason')}
          hint="What stood before stays on record."
          onText={(reason) => set({ reason })}
          wrap="col-span-full"
        />
      ) : null}
      <div className="col-span-full flex flex-col gap-3">
        <ErrorNote
          error={refusal && (refusal.status !== 422 || !Object.keys(refusal.fields).length) ? refusal : null}
        />
        <div>
          <Button type="submit" kind="primary" busy={isSending}>
            {step.doneAt ? `Correct step ${number}` : `Step ${number} is done`}
          </Button>
        </div>
      </div>
    </form>
  )
}

const textOf = (value: number | null) => (value === null ? '' : String(value))
/** A text that is no number goes to the server as it is, which says so at its place. */
const valueOf = (text: string) => (text.trim() ? (readDecimal(text) ?? text) : null)
