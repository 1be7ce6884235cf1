'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { TextArea } from '@/components/ui/text-area'
import { readDecimal } from '@/lib/number/rules'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { attributeName, attributeOf } from '@/lib/reading/schema/attributes'
import { readingKeys } from '@/lib/reading/keys'
import type { ReadingChain } from '@/lib/study/queries/readings'

type Reading = ReadingChain['current']
type Props = { reading: Reading; isOwn: boolean; onDone: () => void }

/** Correct or void: both write a new entry with its reason; a void is for one's own. */
export function ReadingActs({ reading, isOwn, onDone }: Props) {
  const [asked, setAsked] = useState<'correct' | 'void' | null>(null)
  const what = `${attributeName(reading.attribute)}${reading.jarCode ? ` of ${reading.jarCode}` : ''}`
  const close = () => setAsked(null)
  return (
    <span data-screen-only className="flex justify-end gap-4 whitespace-nowrap">
      {reading.jarCode ? (
        <Button kind="link" aria-label={`Correct ${what}`} onClick={() => setAsked('correct')}>
          Correct
        </Button>
      ) : null}
      {isOwn && reading.jarCode ? (
        <Button kind="link" aria-label={`Void ${what}`} onClick={() => setAsked('void')}>
          Void
        </Button>
      ) : null}
      {asked === 'correct' ? <CorrectDialog {...{ reading, what, onDone, close }} /> : null}
      {asked === 'void' ? <VoidDialog {...{ reading, what, onDone, close }} /> : null}
    </span>
  )
}

type DialogProps = { reading: Reading; what: string; onDone: () => void; close: () => void }

function VoidDialog({ reading, what, onDone, close }: DialogProps) {
  const [reason, setReason] = useState('')
  const act = useAct(onDone, close)
  return (
    <Dialog
      isOpen
      onClose={close}
      title={`Void ${what}?`}
      sentence="It stays on record, struck through, with your reason and your name."
      acts={
        <>
          <Button onClick={close}>Leave it</Button>
          <Button
            kind="danger-asked"
            busy={act.busy}
            onClick={() => act.run(readingKeys.void(reading.id), { id: newId(), reason }, `${what} is void`)}
          >
            Void it
          </Button>
        </>
      }
    >
      <TextArea label="Reason" value={reason} onText={setReason} rows={2} error={act.fields['reason']} />
      <ErrorNote error={act.error} />
    </Dialog>
  )
}

function CorrectDialog({ reading, what, onDone, close }: DialogProps) {
  const [values, setValues] = useState(() => startOf(reading))
  const [reason, setReason] = useState('')
  const act = useAct(onDone, close)
  const set = (key: string) => (text: string) => setValues((before) => ({ ...before, [key]: text }))
  const { words } = attributeOf(reading.attribute, reading)
  return (
    <Dialog
      isOpen
      onClose={close}
      title={`Correct ${what}`}
      sentence="What was read stays on record, struck through; the new entry counts."
      acts={
        <>
          <Button onClick={close}>Leave it</Button>
          <Button
            kind="primary"
            busy={act.busy}
            onClick={() =>
              act.run(
                readingKeys.correct(reading.id),
                { id: newId(), ...entryOf(reading, values), isConfirmed: act.isUnlikely, reason },
                `${what} is corrected`,
              )
            }
          >
            {act.isUnlikely ? 'It is so, correct it' : 'Correct it'}
          </Button>
        </>
      }
    >
      {words ? (
        <Select
          label={what}
          value={values['typed'] ?? ''}
          options={words.map((word) => ({ value: word, label: word }))}
          onPick={set('typed')}
        />
      ) : (
        Object.entries(values).map(([key, text]) => (
          <Field
            key={key}
            label={fieldNames[key] ?? what}
            inputMode="decimal"
            value={text}
            onText={set(key)}
            error={act.fields[key] ?? act.fields[`detail.${key}`]}
          />
        ))
      )}
      <TextArea label="Reason" value={reason} onText={setReason} rows={2} error={act.fields['reason']} />
      <ErrorNote error={act.error} />
    </Dialog>
  )
}

const fieldNames: Record<string, string> = {
  torquePercent: 'Torque, %',
  topMm: 'Layer on top, mm',
  bottomMm: 'Layer below, mm',
  grossG: 'Gross, g',
}

/** The fields in which this reading was come by, filled with what stands. */
function startOf({ attribute, detail, typed }: Reading): Record<string, string> {
  if (attributeOf(attribute, undefined).kind === 'layers') {
    return { topMm: String(detail.topMm ?? 0), bottomMm: String(detail.bottomMm ?? 0) }
  }
  if (detail.torquePercent !== undefined) return { torquePercent: typed }
  if (detail.grossG !== undefined) return { grossG: String(detail.grossG) }
  return { typed }
}

function entryOf({ detail }: Reading, values: Record<string, string>) {
  const number = (key: string) => readDecimal(values[key] ?? '') ?? undefined
  if ('topMm' in values) {
    return {
      typed: `top ${values['topMm']} mm, below ${values['bottomMm']} mm`,
      detail: {
        topMm: number('topMm'),
        bottomMm: number('bottomMm'),
        ...besideLayers(detail),
      },
    }
  }
  if ('torquePercent' in values) {
    const { spindle, rpm } = detail
    return {
      typed: values['torquePercent']!,
      detail: { torquePercent: number('torquePercent'), spindle, rpm },
    }
  }
  if ('grossG' in values) return { typed: values['grossG']!, detail: { grossG: number('grossG') } }
  return { typed: values['typed'] ?? '', detail: {} }
}

/** What was noted beside the layers stays as it was read. */
function besideLayers({ totalMm, bleed, creamMm }: Reading['detail']) {
  return {
    ...(totalMm === undefined ? {} : { totalMm }),
    ...(bleed === undefined ? {} : { bleed }),
    ...(creamMm === undefined ? {} : { creamMm }),
  }
}

/** Sends once; what was typed stays where it was refused. A 409 asks whether an unlikely value is so. */
function useAct(onDone: () => void, close: () => void) {
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const refused = error instanceof ClientError ? error : null
  return {
    error,
    busy,
    fields: refused?.fields ?? {},
    isUnlikely: refused?.code === 'confirm',
    async run(url: string, body: unknown, done: string) {
      setBusy(true)
      setError(null)
      try {
        await send(url, 'POST', body)
        toast(done)
        onDone()
        close()
      } catch (thrown) {
        setError(thrown)
      } finally {
        setBusy(false)
      }
    },
  }
}
