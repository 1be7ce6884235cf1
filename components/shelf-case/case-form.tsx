'use client'

import { useRouter } from 'next/navigation'
import { useRef, useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { RadioGroup } from '@/components/ui/radio-group'
import { TextArea } from '@/components/ui/text-area'
import { keep } from '@/components/session/keep'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'

export type CaseDraft = {
  kind: 'real time' | 'provisional'
  proposedMonths: string
  storageStatement: string
  whyFewer: string
  provisionalRule: string
  reviewOn: string
  periodAfterOpeningMonths: string
  periodAfterOpeningEvidence: string
}

type Props = {
  supportedMonths: number
  initial: CaseDraft
  /** A new case on this study, or a draft that is changed. */
  target: { studyId: string; studyStationId: string } | { code: string; version: number }
  onSaved?: () => void
}

/** What the formulator proposes: at most what the evidence supports, and the words that go with it. */
export function CaseForm({ supportedMonths, initial, target, onSaved }: Props) {
  const router = useRouter()
  const [draft, setDraft] = useState(initial)
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const id = useRef(newId())
  const set = (field: keyof CaseDraft) => (text: string) => setDraft((d) => ({ ...d, [field]: text }))
  const fields = error instanceof ClientError ? error.fields : {}
  const months = Number(draft.proposedMonths)
  const isFewer = draft.kind === 'real time' && Number.isInteger(months) && months < supportedMonths

  async function save(event: FormEvent) {
    event.preventDefault()
    setBusy(true)
    setError(null)
    const body = {
      kind: draft.kind,
      proposedMonths: wholeNumber(draft.proposedMonths),
      storageStatement: draft.storageStatement,
      whyFewer: isFewer ? draft.whyFewer : '',
      provisionalRule: draft.kind === 'provisional' ? draft.provisionalRule : '',
      reviewOn: draft.kind === 'provisional' && draft.reviewOn ? draft.reviewOn : null,
      periodAfterOpeningMonths: draft.periodAfterOpeningMonths
        ? wholeNumber(draft.periodAfterOpeningMonths)
        : null,
      periodAfterOpeningEvidence: draft.periodAfterOpeningMonths ? draft.periodAfterOpeningEvidence : '',
    }
    const asked = { what: 'the proposal', text: `${draft.proposedMonths} months, ${draft.storageStatement}` }
    try {
      if ('code' in target) {
        await keep(
          () => send(`/api/cases/${target.code}`, 'PUT', { ...body, version: target.version }),
          asked,
        )
        onSaved?.()
      } else {
        const made = await send<{ code: string }>('/api/cases', 'POST', {
          ...body,
          ...target,
          id: id.current,
        })
        router.push(`/cases/${made.code}`)
      }
    } catch (refused) {
      setError(refused)
    } finally {
      setBusy(false)
    }
  }

  return (
    <form onSubmit={save} className="flex flex-col gap-4" aria-label="Proposal">
      <RadioGroup
        label="What it rests on"
        value={draft.kind}
        onPick={(kind) => setDraft((d) => ({ ...d, kind: kind as CaseDraft['kind'] }))}
        layout="ledger"
        options={[
          { value: 'real time', label: 'Real time: the readings carry it' },
          { value: 'provisional', label: 'Provisional: by the lab’s own written rule' },
        ]}
      />
      <Field
        label="Months"
        inputMode="numeric"
        value={draft.proposedMonths}
        onText={set('proposedMonths')}
        error={fields['proposedMonths']}
        hint={
          draft.kind === 'real time'
            ? `The evidence supports ${supportedMonths}; fewer may be proposed, never more.`
            : undefined
        }
      />
      {isFewer ? (
        <TextArea
          label={`Why ${draft.proposedMonths}, not ${supportedMonths}`}
          value={draft.whyFewer}
          onText={set('whyFewer')}
          error={fields['whyFewer']}
          rows={2}
        />
      ) : null}
      {draft.kind === 'provisional' ? (
        <>
          <TextArea
            label="The lab’s rule"
            hint="Written as it stands in the lab’s procedure. It is shown as a rule, never as statistics."
            value={draft.provisionalRule}
            onText={set('provisionalRule')}
            error={fields['provisionalRule']}
          />
          <Field
            label="Reviewed on"
            type="date"
            value={draft.reviewOn}
            onText={set('reviewOn')}
            error={fields['reviewOn']}
          />
        </>
      ) : null}
      <Field
        label="How it is stored"
        value={draft.storageStatement}
        onText={set('storageStatement')}
        error={fields['storageStatement']}
        hint="As it will stand in the report, for instance: closed, at or below 25 °C"
      />
      <Field
        label="Months after opening, if stated"
        inputMode="numeric"
        value={draft.periodAfterOpeningMonths}
        onText={set('periodAfterOpeningMonths')}
        error={fields['periodAfterOpeningMonths']}
      />
      {draft.periodAfterOpeningMonths ? (
        <TextArea
          label="What that rests on"
          value={draft.periodAfterOpeningEvidence}
          onText={set('periodAfterOpeningEvidence')}
          error={fields['periodAfterOpeningEvidence']}
          rows={2}
        />
      ) : null}
      <ErrorNote error={error} />
      <div>
        <Button kind={'code' in target ? 'secondary' : 'primary'} type="submit" busy={isBusy}>
          {'code' in target ? 'Save the draft' : 'Begin the case'}
        </Button>
      </div>
    </form>
  )
}

/** A number where it is one; otherwise the text goes to the server, whose sentence names the field. */
function wholeNumber(text: string): number | string {
  return /^\d+$/.test(text.trim()) ? Number(text) : text
}
