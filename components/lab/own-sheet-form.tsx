'use client'

import { useState, type FormEvent } from 'react'
import useSWR from 'swr'
import { SheetPlan } from '@/components/jar/sheet-plan'
import { keep } from '@/components/session/keep'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { NumberField } from '@/components/ui/number-field'
import { Select } from '@/components/ui/select'
import { toast } from '@/components/ui/toast'
import { ClientError, fetcher, send } from '@/lib/http/fetcher'
import type { LabelGrid } from '@/lib/label/rules/grid'
import { labelGrid } from '@/lib/label/schema'
import type { Lab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/keys'
import { readDecimal } from '@/lib/number/rules'

const fields = [
  { key: 'columns', label: 'Beside each other', unit: '' },
  { key: 'rows', label: 'Below each other', unit: '' },
  { key: 'widthMm', label: 'Width of a label', unit: 'mm' },
  { key: 'heightMm', label: 'Height of a label', unit: 'mm' },
  { key: 'leftMm', label: 'Left margin', unit: 'mm' },
  { key: 'topMm', label: 'Upper margin', unit: 'mm' },
  { key: 'gapXMm', label: 'Gap between columns', unit: 'mm' },
  { key: 'gapYMm', label: 'Gap between rows', unit: 'mm' },
] as const

type Draft = Record<(typeof fields)[number]['key'], string> & { paper: LabelGrid['paper'] }

/** The lab's own label sheet, measured with a ruler; refused where it does not fit or could not be read. */
export function OwnSheetForm() {
  const { data: lab, mutate } = useSWR<Lab, ClientError>(labKey, fetcher)
  const [draft, setDraft] = useState<Draft | null>(null)
  const [isSending, setSending] = useState(false)
  const [error, setError] = useState<unknown>(null)
  if (!lab) return null
  const shown = draft ?? draftOf(lab.labelGrid)
  const read = labelGrid.safeParse(gridOf(shown))
  const faults = read.success ? [] : read.error.issues
  const isWhole = fields.every(({ key }) => readDecimal(shown[key]) !== null)
  const faultOf = (key: string) =>
    isWhole ? faults.find((issue) => issue.path[0] === key)?.message : undefined

  async function save(grid: LabelGrid | null) {
    if (!lab) return
    setSending(true)
    setError(null)
    try {
      await keep(() => send(labKey, 'PATCH', { version: lab.version, labelGrid: grid }), {
        what: 'label sheet of the lab',
      })
      await mutate()
      setDraft(null)
      toast(grid ? 'The label sheet is kept' : 'The label sheet is taken out')
    } catch (thrown) {
      setError(thrown)
      if (thrown instanceof ClientError && thrown.status === 412) await mutate()
    } finally {
      setSending(false)
    }
  }

  function submit(event: FormEvent) {
    event.preventDefault()
    if (read.success) void save(read.data)
  }

  return (
    <form method="post" onSubmit={submit} noValidate className="grid gap-3.5">
      <Select
        label="Paper"
        value={shown.paper}
        options={[
          { value: 'A4', label: 'A4, 210 × 297 mm' },
          { value: 'Letter', label: 'US Letter, 215.9 × 279.4 mm' },
        ]}
        onPick={(paper) => setDraft({ ...shown, paper: paper as LabelGrid['paper'] })}
      />
      <div className="grid grid-cols-2 items-end gap-3.5 sm:grid-cols-4">
        {fields.map(({ key, label, unit }) => (
          <NumberField
            key={key}
            label={label}
            unit={unit || undefined}
            value={shown[key]}
            onText={(text) => setDraft({ ...shown, [key]: text })}
            error={faultOf(key)}
          />
        ))}
      </div>
      {read.success ? <SheetPlan grid={read.data} /> : null}
      <ErrorNote error={error} />
      <div className="flex flex-wrap gap-3">
        <Button
          type="submit"
          busy={isSending}
          why={
            draft === null
              ? 'Nothing is changed yet.'
              : !isWhole
                ? 'A measure is missing.'
                : read.success
                  ? undefined
                  : 'This sheet cannot be printed.'
          }
        >
          Keep the sheet
        </Button>
        {lab.labelGrid ? (
          <Button kind="link" onClick={() => void save(null)}>
            Take it out
          </Button>
        ) : null}
      </div>
    </form>
  )
}

function draftOf(grid: LabelGrid | null): Draft {
  const text = (key: (typeof fields)[number]['key']) => (grid ? String(grid[key]) : '')
  return {
    paper: grid?.paper ?? 'A4',
    ...(Object.fromEntries(fields.map(({ key }) => [key, text(key)])) as Omit<Draft, 'paper'>),
  }
}

function gridOf(draft: Draft) {
  return {
    paper: draft.paper,
    ...Object.fromEntries(fields.map(({ key }) => [key, readDecimal(draft[key]) ?? undefined])),
  }
}
