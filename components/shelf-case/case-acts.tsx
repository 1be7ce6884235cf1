'use client'

import { useRef, useState } from 'react'
import { CaseForm } from '@/components/shelf-case/case-form'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { newId } from '@/lib/db/id'
import { send } from '@/lib/http/fetcher'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'

type Props = { detail: CaseDetail; supportedMonths: number; mayPutForward: boolean; onDone: () => void }

/** A draft: change the proposal, then put it forward, which freezes every figure on the page. */
export function CaseActs({ detail, supportedMonths, mayPutForward, onDone }: Props) {
  const [error, setError] = useState<unknown>(null)
  const [isBusy, setBusy] = useState(false)
  const key = useRef(newId())
  if (!mayPutForward) return <p className="text-soft">A formulator puts this draft forward.</p>

  async function putForward() {
    setBusy(true)
    setError(null)
    try {
      await send(
        `/api/cases/${detail.code}/put-forward`,
        'POST',
        { version: detail.version },
        { key: key.current },
      )
      onDone()
    } catch (refused) {
      setError(refused)
      key.current = newId()
    } finally {
      setBusy(false)
    }
  }

  return (
    <section className="border-2 border-ink p-4" aria-label="Draft">
      <h2 className="text-20 font-650">Your draft</h2>
      <p className="mb-4 text-13 text-soft">
        Putting it forward freezes the figures as they stand on this page; QA then signs exactly those.
      </p>
      <CaseForm
        key={detail.version}
        supportedMonths={supportedMonths}
        target={{ code: detail.code, version: detail.version }}
        onSaved={onDone}
        initial={{
          kind: detail.kind as 'real time' | 'provisional',
          proposedMonths: String(detail.proposedMonths ?? ''),
          storageStatement: detail.storageStatement,
          whyFewer: detail.whyFewer,
          provisionalRule: detail.provisionalRule,
          reviewOn: detail.reviewOn ?? '',
          periodAfterOpeningMonths: detail.periodAfterOpeningMonths
            ? String(detail.periodAfterOpeningMonths)
            : '',
          periodAfterOpeningEvidence: detail.periodAfterOpeningEvidence,
        }}
      />
      <div className="mt-4 flex flex-col gap-3 border-t border-rule pt-4">
        <ErrorNote error={error} />
        <div>
          <Button kind="primary" busy={isBusy} onClick={putForward}>
            Put it forward
          </Button>
        </div>
      </div>
    </section>
  )
}
