import { HashComb } from '@/components/marks/hash-comb'
import { LinkButton } from '@/components/ui/link-button'
import { hashGroups, instantText } from '@/lib/report/rules'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'

/** Who signed what and when, and the hash of the frozen content drawn so that it can be compared by eye. */
export function SignatureBox({ detail, zone }: { detail: CaseDetail; zone: string }) {
  return (
    <section className="border-2 border-ink p-4" aria-label="Signature">
      {detail.signatures.length === 0 ? (
        <h2 className="text-20 font-650">Waits for QA</h2>
      ) : (
        detail.signatures.map((s) => (
          <div key={s.id} className="mb-3">
            <h2 className="text-20 font-650">{s.meaning === 'approve' ? 'Approved' : 'Sent back'}</h2>
            <p>
              {s.personName}, {instantText(s.signedAt, s.zone)}
            </p>
            {s.comment ? <p className="text-soft">“{s.comment}”</p> : null}
            {s.belongs ? null : (
              <p role="alert" className="mt-1 font-650 text-alarm">
                This signature does not belong to this content: one of them was changed or moved below the
                application.
              </p>
            )}
          </div>
        ))
      )}
      {detail.putForwardBy && detail.putForwardAt ? (
        <p className="text-15 text-soft">
          Put forward by {detail.putForwardBy}, {instantText(detail.putForwardAt, zone)}
        </p>
      ) : null}
      <ContentHash sha256={detail.contentSha256 ?? ''} />
      <Recheck code={detail.code} />
      {detail.state === 'signed' || detail.state === 'superseded' ? (
        <div className="mt-4">
          <LinkButton kind="primary" href={`/api/cases/${detail.code}/report`} prefetch={false}>
            Open the report
          </LinkButton>
        </div>
      ) : null}
    </section>
  )
}

export function ContentHash({ sha256 }: { sha256: string }) {
  const groups = hashGroups(sha256)
  return (
    <div className="mt-4 border-t border-rule pt-3">
      <p className="text-13 text-soft">SHA-256 of the frozen content</p>
      <div className="mt-2">
        <HashComb sha256={sha256} width={290} height={30} />
      </div>
      <p className="mt-2 flex flex-wrap gap-x-3 font-mono text-13">
        {groups.map((g, i) => (
          <span key={i}>{g}</span>
        ))}
      </p>
    </div>
  )
}

/** How anyone makes the figures again, outside the application. */
export function Recheck({ code }: { code: string }) {
  return (
    <p className="mt-2 text-13 text-soft">
      <a className="underline underline-offset-4" href={`/api/cases/${code}/content`} download>
        Download the frozen content
      </a>{' '}
      and run <span className="font-mono">npm run --silent recheck -- case-{code}.json</span>: it computes
      every figure again.
    </p>
  )
}
