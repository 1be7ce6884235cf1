'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { ErrorNote } from '@/components/ui/error-note'
import { RadioGroup } from '@/components/ui/radio-group'
import { TextArea } from '@/components/ui/text-area'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { formulaAnswersKey } from '@/lib/formula-answer/keys'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { ClientError, send } from '@/lib/http/fetcher'
import { aboutText, givenText, withUnits } from './checks-words'

type Props = {
  formula: { code: string; number: number; versionId: string }
  check: FormulaCheck
  mayWrite: boolean
  isDirty: boolean
  onClose: () => void
  onAnswered: () => void
}

/** One question with its reason and what was answered so far; answered or set aside with a note. */
export function ChecksDialog({ formula, check, mayWrite, isDirty, onClose, onAnswered }: Props) {
  const [id] = useState(newId)
  const [kind, setKind] = useState<string>('answered')
  const [note, setNote] = useState(check.isReopened ? (check.given?.note ?? '') : '')
  const [error, setError] = useState<unknown>(null)
  const [busy, setBusy] = useState(false)
  const fields = error instanceof ClientError ? error.fields : {}
  const mayAnswer = mayWrite && check.isAsked

  async function keep() {
    setBusy(true)
    setError(null)
    try {
      await send(formulaAnswersKey(formula.code), 'POST', {
        ...{ id, versionId: formula.versionId, question: check.key, askedAbout: check.askedAbout },
        ...{ kind, note },
      })
      toast(kind === 'answered' ? 'The answer is kept.' : 'The question is set aside.')
      onAnswered()
      onClose()
    } catch (thrown) {
      setError(thrown)
    } finally {
      setBusy(false)
    }
  }

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={check.question}
      sentence={<span className={check.isOpen ? 'font-650 text-alarm' : ''}>{withUnits(check.answer)}</span>}
      width={560}
      acts={
        mayAnswer ? (
          <>
            <Button onClick={onClose} className="self-start">
              Not now
            </Button>
            <Button
              kind="primary"
              busy={busy}
              why={isDirty ? 'Save the version first: an answer rests on what is saved.' : undefined}
              onClick={() => void keep()}
            >
              {kind === 'answered' ? 'Keep the answer' : 'Set it aside'}
            </Button>
          </>
        ) : (
          <Button onClick={onClose}>Close</Button>
        )
      }
    >
      <p className="text-15 text-soft">
        {check.reason} {aboutText(check)} <span className="whitespace-nowrap">[{check.mark}]</span>
      </p>
      {check.given ? (
        <p className="border-l-[3px] border-rule pl-3 text-15 [overflow-wrap:anywhere]">
          {givenText(check.given, formula.number)}
          {check.isReopened ? (
            <span className="block text-soft">What it rested on has changed since, so it is open again.</span>
          ) : null}
        </p>
      ) : null}
      {mayAnswer ? (
        <>
          <RadioGroup
            label="What becomes of it"
            hideLabel
            value={kind}
            options={[
              { value: 'answered', label: 'This answers it' },
              { value: 'set aside', label: 'Set it aside' },
            ]}
            onPick={setKind}
          />
          <TextArea
            label="Note"
            value={note}
            onText={setNote}
            error={fields['note']}
            hint="Kept with your name; it holds until a line or step it rests on changes."
          />
        </>
      ) : null}
      <ErrorNote error={error && !fields['note'] ? error : null} />
    </Dialog>
  )
}
