'use client'

import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { TextArea } from '@/components/ui/text-area'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { batchValue, measured, phPathFor } from '@/lib/batch/rules/readings'
import { restHours } from '@/lib/batch/rules/rest'
import { batchAttributes, type BatchAttribute, type ReadingMoment } from '@/lib/batch/schema'
import { newId } from '@/lib/db/id'
import { grouped, readDecimal } from '@/lib/number/rules'
import { dropCount } from '@/lib/batch/rules/droplets'
import { ReadingDetailFields, type DetailTexts } from './reading-detail-fields'
import { figureOf } from './reading-words'
import { useEntry } from './use-entry'
import { useKept } from '@/components/device/use-kept'
import type { BatchWork } from './work'

type Reading = BatchPage['readings'][number]
type Props = { work: BatchWork; moment: ReadingMoment; corrected: Reading | null; onKept: () => void }

/** One reading of the batch: what, how, and the figure; a replicate is one more of the same. */
export function ReadingForm({ work, moment, corrected, onKept }: Props) {
  const { batch } = work
  const { keep, isSending, fields, refusal } = useEntry(work)
  const [id] = useState(newId)
  const [draft, set, forget] = useKept(
    // Counted on, so that what was just kept is not found again as a draft.
    `batch.${batch.id}.${moment}.${corrected?.id ?? batch.readings.length}`,
    corrected ? draftOf(corrected) : emptyDraft(phPathFor(batch.emulsionType)),
  )
  const attribute = batchAttributes.find((one) => one === draft.attribute)
  const instrument = batch.instruments.find((one) => one.id === draft.instrumentId)
  const detail = attribute ? detailOf(attribute, draft) : {}
  const value =
    attribute && draft.typed.trim()
      ? batchValue({ attribute, typed: draft.typed, detail }, instrument?.spindles ?? [])
      : null
  const isEarly = moment === 'initial' && (batch.restedHours ?? 0) < restHours.least
  const replicate = corrected?.replicate ?? nextReplicate(batch, moment, attribute)

  async function save(event: FormEvent) {
    event.preventDefault()
    const body = {
      ...{ id, moment, attribute: draft.attribute, replicate, typed: draft.typed, note: draft.note },
      ...{
        instrumentId: draft.instrumentId || null,
        supersedes: corrected?.id ?? null,
        reason: draft.reason,
      },
      detail: attribute ? rawDetail(attribute, draft) : {},
    }
    const name = `${attribute ? measured[attribute].label : 'Reading'} ${draft.typed}`
    if (!(await keep({ id, kind: 'readings', name, body }))) return
    forget()
    onKept()
  }

  const isTorque = attribute === 'viscosity' && draft.detail.spindle.trim() !== ''
  const unit = isTorque ? '% torque' : attribute ? measured[attribute].unit : ''
  return (
    <form
      noValidate
      onSubmit={(event) => void save(event)}
      className="mt-3 grid max-w-[720px] gap-4 sm:grid-cols-2"
    >
      <Select
        label={corrected ? 'What is corrected' : 'What is read'}
        empty="Choose"
        value={draft.attribute}
        disabled={corrected !== null}
        error={fields['attribute']}
        options={batchAttributes.map((key) => ({ value: key, label: measured[key].label }))}
        onPick={(picked) => set({ attribute: picked, typed: '', instrumentId: '' })}
      />
      {attribute ? (
        <>
          {attribute === 'droplets' ? (
            <TextArea
              label={`Diameters in micrometres${replicate > 1 ? `, replicate ${replicate}` : ''}`}
              value={draft.typed}
              error={fields['typed']}
              hint={said(attribute, value) ?? 'One a drop, or with how many: 2.5 × 12; 3.5 × 30.'}
              rows={3}
              onText={(typed) => set({ typed })}
              wrap="sm:col-span-2"
            />
          ) : (
            <Field
              label={
                attribute === 'look' ? 'In words' : `Figure${replicate > 1 ? `, replicate ${replicate}` : ''}`
              }
              unit={unit}
              inputMode={attribute === 'look' ? 'text' : 'decimal'}
              className={attribute === 'look' ? '' : 'text-right'}
              value={draft.typed}
              error={fields['typed']}
              hint={said(attribute, value)}
              onText={(typed) => set({ typed })}
            />
          )}
          <ReadingDetailFields
            attribute={attribute}
            batch={batch}
            texts={draft.detail}
            instrumentId={draft.instrumentId}
            fields={fields}
            onTexts={(change) => set({ detail: { ...draft.detail, ...change } })}
            onInstrument={(instrumentId) => set({ instrumentId })}
          />
          <Field
            label="Remark"
            value={draft.note}
            error={fields['note']}
            onText={(note) => set({ note })}
            wrap="sm:col-span-2"
          />
          {isEarly || corrected ? (
            <Field
              label={corrected ? 'Why the reading is corrected' : 'Why it is read before the rest is over'}
              value={draft.reason}
              error={fields['reason']}
              onText={(reason) => set({ reason })}
              wrap="sm:col-span-2"
            />
          ) : null}
        </>
      ) : null}
      <div className="flex flex-col gap-3 sm:col-span-2">
        <ErrorNote error={refusal} />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" busy={isSending} why={attribute ? undefined : 'Choose what is read.'}>
            {corrected ? 'Keep the corrected reading' : 'Keep the reading'}
          </Button>
          {corrected ? <Button onClick={onKept}>Leave it as it is</Button> : null}
        </div>
      </div>
    </form>
  )
}

function said(attribute: BatchAttribute, value: ReturnType<typeof batchValue> | null): string | undefined {
  if (value === null) return undefined
  if ('sentence' in value) return value.sentence
  if (attribute === 'viscosity' && value.value !== null) return figureOf(attribute, value.value)
  const { drops } = value.detail
  if (drops)
    return `${grouped(dropCount(drops), 0)} drops, D[3,2] ${drops.d32.toFixed(2)}, d50 by volume ${drops.d50v.toFixed(2)} micrometres`
  return value.detail.rcf ? `${value.detail.rcf.toFixed(0)} times gravity` : undefined
}

function nextReplicate(batch: BatchPage, moment: ReadingMoment, attribute: BatchAttribute | undefined) {
  const read = batch.readings.filter((one) => one.moment === moment && one.attribute === attribute)
  return Math.max(0, ...read.map((one) => one.replicate)) + 1
}

const emptyDraft = (path: string) => ({
  ...{ attribute: '', typed: '', instrumentId: '', note: '', reason: '' },
  detail: {
    ...{ path, ratio: '', sampleTemperatureC: '', spindle: '', rpm: '', radiusMm: '', minutes: '' },
  } satisfies DetailTexts,
})
type Draft = ReturnType<typeof emptyDraft>

function draftOf(reading: Reading): Draft {
  const { detail } = reading
  const text = (value: number | undefined) => (value === undefined ? '' : String(value))
  return {
    ...{ attribute: reading.attribute, typed: reading.typed, instrumentId: reading.instrumentId ?? '' },
    ...{ note: reading.note, reason: '' },
    detail: {
      ...{ path: detail.path ?? '', ratio: detail.ratio ?? '', spindle: detail.spindle ?? '' },
      ...{ sampleTemperatureC: text(detail.sampleTemperatureC), rpm: text(detail.rpm) },
      ...{ radiusMm: text(detail.radiusMm), minutes: text(detail.minutes) },
    },
  }
}

/** Which details belong to what; a text that is no number goes to the server, which says so at its place. */
const detailsOf: Record<BatchAttribute, readonly (keyof DetailTexts)[]> = {
  look: [],
  ph: ['path', 'ratio', 'sampleTemperatureC'],
  viscosity: ['spindle', 'rpm', 'sampleTemperatureC'],
  density: ['sampleTemperatureC'],
  centrifuge: ['rpm', 'radiusMm', 'minutes', 'sampleTemperatureC'],
  droplets: [],
  temperature: [],
}

function rawDetail(attribute: BatchAttribute, { detail }: Draft): Record<string, unknown> {
  const isWord = (key: string) => ['path', 'ratio', 'spindle'].includes(key)
  return Object.fromEntries(
    detailsOf[attribute].flatMap((key) => {
      const text = detail[key].trim()
      return text ? [[key, isWord(key) ? text : (readDecimal(text) ?? text)]] : []
    }),
  )
}

function detailOf(attribute: BatchAttribute, draft: Draft) {
  const raw = rawDetail(attribute, draft)
  const number = (key: string) => {
    const value = raw[key]
    return typeof value === 'number' ? { [key]: value } : {}
  }
  const spindle = typeof raw['spindle'] === 'string' ? { spindle: raw['spindle'] } : {}
  return { ...spindle, ...number('rpm'), ...number('radiusMm'), ...number('minutes') }
}
