'use client'

import { useRef, useState, type FormEvent } from 'react'
import { ContentHash, Recheck } from '@/components/shelf-case/signature-box'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { RadioGroup } from '@/components/ui/radio-group'
import { TextArea } from '@/components/ui/text-area'
import { newId } from '@/lib/db/id'
import { ClientError, send } from '@/lib/http/fetcher'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'

type Props = {
  detail: CaseDetail
  whyNot: string | null
  demoPassword: string | null
  onDone: () => void
}

/** QA chooses a meaning, types the password once more, and signs the content whose hash stands below. */
export function SignPanel({ detail, whyNot, demoPassword, onDone }: Props) {
  const [meaning, setMeaning] = useState<string | null>(null)
  const [comment, setComment] = useState('')
  const [password, setPassword] = useState('')
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  // One id for one intention: pressing twice signs once.
  const signatureId = useRef(newId())

  async function sign(event: FormEvent) {
    event.preventDefault()
    setBusy(true)
    setError(null)
    try {
      await send(`/api/cases/${detail.code}/sign`, 'POST', {
        id: signatureId.current,
        version: detail.version,
        contentSha256: detail.contentSha256,
        meaning,
        comment,
        password,
      })
      onDone()
    } catch (refused) {
      setError(refused)
      setPassword('')
      // Another content than the one seen: show it before anyone signs.
      if (refused instanceof ClientError && refused.status === 412) onDone()
    } finally {
      setBusy(false)
    }
  }

  const fields = error instanceof ClientError ? error.fields : {}
  return (
    <form onSubmit={sign} className="border-2 border-ink p-4" aria-label="Your signature">
      <div className="flex items-baseline justify-between">
        <h2 className="text-20 font-650">Your signature</h2>
        <span className="text-13 text-soft">not yet signed</span>
      </div>
      <p className="mt-1 text-13 text-soft">{whyNot ?? 'You logged, voided and put forward nothing here.'}</p>
      {whyNot ? null : (
        <div className="mt-3 flex flex-col gap-3">
          <RadioGroup
            label="What your signature means"
            hideLabel
            layout="ledger"
            value={meaning}
            onPick={setMeaning}
            error={fields['meaning']}
            options={[
              {
                value: 'approve',
                label: (
                  <>
                    <b>Approve.</b> I reviewed the record and approve {detail.proposedMonths} months,{' '}
                    {detail.storageStatement}.
                  </>
                ),
              },
              {
                value: 'send back',
                label: (
                  <>
                    <b>Send back,</b> and say what must change
                  </>
                ),
              },
            ]}
          />
          <TextArea
            label={meaning === 'send back' ? 'What must change' : 'Remark, if any'}
            value={comment}
            onText={setComment}
            error={fields['comment']}
            rows={2}
          />
          <Field
            label="Password, once more"
            type="password"
            autoComplete="current-password"
            value={password}
            onText={setPassword}
            error={fields['password']}
            hint={demoPassword ? `In the demo it is “${demoPassword}”.` : undefined}
          />
          <ErrorNote error={error} />
          <div>
            <Button
              kind="primary"
              type="submit"
              busy={isBusy}
              why={
                meaning === null
                  ? 'Choose a meaning first.'
                  : password === ''
                    ? 'Type your password first.'
                    : undefined
              }
            >
              Sign
            </Button>
          </div>
        </div>
      )}
      <ContentHash sha256={detail.contentSha256 ?? ''} />
      <Recheck code={detail.code} />
    </form>
  )
}
