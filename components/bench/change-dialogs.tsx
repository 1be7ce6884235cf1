'use client'

import { useState } from 'react'
import { ChoiceChips } from '@/components/bench/choice-chips'
import type { JarReading } from '@/components/bench/done-panel'
import { emptyDraft, entriesOf, slotsOf } from '@/components/bench/draft'
import { QuickReason } from '@/components/bench/quick-reason'
import { slotLabel, slotUnit, verdictOf } from '@/components/bench/verdict'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import type { BenchJarPage } from '@/lib/bench/queries/jar'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import { readingKeys } from '@/lib/reading/keys'
import { conditionKeys } from '@/lib/reading/rules/conditions'

const quickReasons = ['misread', 'typed wrong', 'another jar', 'instrument was not ready'] as const

type Props = { jar: BenchJarPage; reading: JarReading; onClose: () => void; onDone: () => void }

/** What it should be takes the place of what was typed; both stay on record with the reason. */
export function CorrectDialog({ jar, reading, onClose, onDone }: Props) {
  const [texts, setTexts] = useState<Record<string, string>>({})
  const [reason, setReason] = useState('')
  const [id] = useState(newId)
  const act = useAct(onDone)
  const direct = typeof reading.detail['torquePercent'] === 'number' ? [] : [reading.attribute]
  const field = jar.fields.find((one) => one.attribute === reading.attribute)
  const slots = slotsOf(field ? [field] : [], jar.tareG !== null && jar.grossG !== null, direct).filter(
    (slot) => slot.replicate === reading.replicate,
  )
  const draft = { ...emptyDraft(''), texts, conditions: { [reading.attribute]: conditionsOf(reading) } }
  const [entry] = entriesOf(slots, draft, jar.fillHeightMm, () => reading.instrumentId)
  const verdict = field ? verdictOf(field, entry, jar) : ({ state: 'empty' } as const)
  const wrong = verdict.state === 'impossible' ? verdict.sentence : undefined
  const isAsked = act.error instanceof ClientError && act.error.code === 'confirm'

  function correct() {
    if (!entry) return
    const { typed, detail, instrumentId } = entry
    void act.run(readingKeys.correct(reading.id), {
      ...{ id, typed, detail, reason, isConfirmed: isAsked },
      ...(instrumentId ? { instrumentId } : {}),
    })
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Correct ${field?.label ?? reading.attribute} of ${jar.name}`}
      sentence={`It was typed ${reading.typed}. That stays on record, struck through, with your reason and your name.`}
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="primary"
            busy={act.isBusy}
            why={
              entry ? (wrong ?? (reason.trim() === '' ? 'Say why.' : undefined)) : 'Type what it should be.'
            }
            onClick={correct}
          >
            {isAsked ? 'It is so, correct it' : 'Correct it'}
          </Button>
        </>
      }
    >
      {slots.map((slot) =>
        slot.field.words && slot.kind === 'word' ? (
          <ChoiceChips
            key={slot.key}
            label="What it should be"
            columns="sm:grid-cols-2"
            choices={slot.field.words.map((word) => ({ value: word, label: word }))}
            picked={texts[slot.key] ?? ''}
            onPick={(word) => setTexts((all) => ({ ...all, [slot.key]: word }))}
          />
        ) : (
          <Field
            key={slot.key}
            label={`${slotLabel(slot)}${slotUnit(slot) ? `, ${slotUnit(slot)}` : ''}`}
            density="bench"
            inputMode="decimal"
            autoFocus={slot === slots[0]}
            value={texts[slot.key] ?? ''}
            onText={(text) => setTexts((all) => ({ ...all, [slot.key]: text }))}
            error={wrong}
          />
        ),
      )}
      <QuickReason choices={quickReasons} reason={reason} onReason={setReason} error={act.fieldError} />
      <ErrorNote error={act.error} />
    </Dialog>
  )
}

/** Under which it was read; a correction of the number changes none of them. */
function conditionsOf({ attribute, detail }: JarReading) {
  return Object.fromEntries(conditionKeys(attribute).map((key) => [key, detail[key] ?? null]))
}

type VoidProps = { id: string; name: string; onClose: () => void; onDone: () => void }

export function VoidDialog({ id, name, onClose, onDone }: VoidProps) {
  const [reason, setReason] = useState('')
  const [voidId] = useState(newId)
  const act = useAct(onDone)
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Void the reading of ${name}?`}
      sentence="It stays on record, struck through, with your reason and your name."
      density="bench"
      acts={
        <>
          <Button density="bench" onClick={onClose}>
            Leave it
          </Button>
          <Button
            density="bench"
            kind="danger-asked"
            busy={act.isBusy}
            onClick={() => void act.run(readingKeys.void(id), { id: voidId, reason })}
          >
            Void it
          </Button>
        </>
      }
    >
      <QuickReason choices={quickReasons} reason={reason} onReason={setReason} error={act.fieldError} />
      <ErrorNote error={act.error} />
    </Dialog>
  )
}

function useAct(onDone: () => void) {
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  async function run(url: string, body: object) {
    setBusy(true)
    setError(null)
    try {
      await send(url, 'POST', body)
      onDone()
    } catch (refused) {
      setError(refused)
      setBusy(false)
    }
  }
  const fieldError = error instanceof ClientError ? error.fields['reason'] : undefined
  return { run, error, isBusy, fieldError }
}
