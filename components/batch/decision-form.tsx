'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Section } from '@/components/ui/section'
import { TextArea } from '@/components/ui/text-area'
import { restHours } from '@/lib/batch/rules/rest'
import type { BatchPage } from '@/lib/batch/queries/get-batch'
import { useAct } from './use-act'

type Props = { batch: BatchPage; onSaved: () => void }

/** Released or rejected, once; rejecting is asked twice. */
export function DecisionForm({ batch, onSaved }: Props) {
  const { act, isSending, fields, refusal } = useAct(`/api/batches/${batch.code}/decision`, onSaved)
  const [reason, setReason] = useState('')
  const [isAsked, setIsAsked] = useState(false)
  const decide = (decision: 'released' | 'rejected') => void act({ version: batch.version, decision, reason })
  const isEarly = (batch.restedHours ?? 0) < restHours.least
  const why =
    batch.state === 'making'
      ? 'It is still being made.'
      : batch.emulsionTypeFound === null
        ? 'The emulsion-type test comes first.'
        : undefined
  return (
    <Section title="Decision" sentence="A released batch can be put into a study. Neither is taken back.">
      <div className="flex max-w-[640px] flex-col gap-4">
        <TextArea
          label="Reason"
          value={reason}
          error={fields['reason']}
          onText={setReason}
          hint={
            isEarly && batch.state === 'resting'
              ? `It has rested ${Math.floor(batch.restedHours ?? 0)} of ${restHours.least} h, so a release says why now.`
              : 'A rejection says why.'
          }
        />
        <ErrorNote error={refusal} />
        <div className="flex flex-wrap items-start gap-[var(--control-gap)]">
          <Button kind="primary" busy={isSending} why={why} onClick={() => decide('released')}>
            Release {batch.code}
          </Button>
          {isAsked ? (
            <Button kind="danger-asked" busy={isSending} onClick={() => decide('rejected')}>
              Yes, reject {batch.code}
            </Button>
          ) : (
            <Button kind="danger" onClick={() => setIsAsked(true)}>
              Reject it
            </Button>
          )}
        </div>
      </div>
    </Section>
  )
}
