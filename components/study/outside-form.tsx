'use client'

import { useRef, useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { readDecimal } from '@/lib/number/rules'
import type { OutsideResult } from '@/lib/outside/queries'
import { outsideKeys } from '@/lib/outside/keys'
import { outcomes } from '@/lib/outside/schema'
import { outsideTests } from '@/lib/protocol/schema'

type Props = {
  code: string
  batches: string[]
  /** What is corrected; it stays on record. */
  old: OutsideResult | null
  onClose: () => void
  onDone: () => void
}

const asOptions = (values: readonly string[]) => values.map((value) => ({ value, label: value }))

export function OutsideForm({ code, batches, old, onClose, onDone }: Props) {
  const [typed, setTyped] = useState(() => ({
    what: old?.what ?? '',
    test: old?.test ?? '',
    outcome: old?.outcome ?? '',
    value: old?.value ?? '',
    batch: old?.batch ?? '',
    weeks: old?.timeWeeks == null ? '' : String(old.timeWeeks),
    labName: old?.labName ?? '',
    reportNumber: old?.reportNumber ?? '',
    reportedOn: old?.reportedOn ?? '',
    note: old?.note ?? '',
    reason: '',
  }))
  const [file, setFile] = useState<File | null>(null)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const id = useRef(newId())
  const input = useRef<HTMLInputElement>(null)
  const fields = error instanceof ClientError ? error.fields : {}
  const part = (key: keyof typeof typed) => ({
    value: typed[key],
    error: fields[key],
    onText: (text: string) => setTyped((before) => ({ ...before, [key]: text })),
  })
  const pick = (key: keyof typeof typed) => ({
    value: typed[key],
    error: fields[key],
    onPick: (text: string) => setTyped((before) => ({ ...before, [key]: text })),
  })

  async function keep() {
    setBusy(true)
    setError(null)
    const form = new FormData()
    form.set('id', id.current)
    for (const [key, text] of Object.entries(typed)) form.set(key, text)
    form.set('weeks', String(readDecimal(typed.weeks) ?? typed.weeks))
    if (old) form.set('supersedesId', old.id)
    if (file) form.set('file', file)
    try {
      await send(outsideKeys.ofStudy(code), 'POST', form, { key: id.current })
      onDone()
    } catch (refused) {
      setError(refused)
      setBusy(false)
      id.current = newId()
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      width={640}
      title={old ? `Correct report ${old.reportNumber}` : 'A report of an outside laboratory'}
      sentence={
        old
          ? 'What was entered stays on record, struck through; this takes its place.'
          : 'It is kept with its document and is never changed.'
      }
      acts={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind="primary" busy={isBusy} onClick={keep}>
            Keep the result
          </Button>
        </>
      }
    >
      <div className="grid gap-3 sm:grid-cols-2">
        <Select label="Tested for" empty="Choose" options={asOptions(outsideTests)} {...pick('what')} />
        <Field label="Test" placeholder="challenge test, five strains" {...part('test')} />
        <Select label="Outcome" empty="Choose" options={asOptions(outcomes)} {...pick('outcome')} />
        <Field label="Value, as reported" placeholder="under 10 CFU/g" {...part('value')} />
        <Select label="Batch" empty="all batches" options={asOptions(batches)} {...pick('batch')} />
        <NumberField label="Week of the jars" placeholder="the whole study" {...part('weeks')} />
        <Field label="Laboratory" {...part('labName')} />
        <Field label="Report number" {...part('reportNumber')} />
        <Field label="Day of the report" type="date" {...part('reportedOn')} />
        <div className="grid content-start gap-1.5">
          <span className="text-13 font-650">Its document, PDF or picture</span>
          <input
            ref={input}
            type="file"
            accept="application/pdf,image/jpeg,image/png"
            aria-label="Document of the report"
            className="sr-only"
            tabIndex={-1}
            onChange={(event) => setFile(event.target.files?.[0] ?? null)}
          />
          <Button onClick={() => input.current?.click()}>{file ? file.name : 'Choose the file'}</Button>
          {fields['file'] ? (
            <span role="alert" className="text-13 text-alarm">
              {fields['file']}
            </span>
          ) : null}
        </div>
      </div>
      <Field label="Note" {...part('note')} />
      {old ? <Field label="Why it is corrected" {...part('reason')} /> : null}
      <ErrorNote error={error} />
    </Dialog>
  )
}
