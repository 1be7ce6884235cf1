'use client'

import { ListPages } from '@/components/list/list-pages'
import { ListTools } from '@/components/list/list-tools'
import { HashComb } from '@/components/marks/hash-comb'
import { LinkButton } from '@/components/ui/link-button'
import type { ListQuery } from '@/lib/list/schema'
import type { ReportsPage } from '@/lib/report/queries'
import { hashGroups, instantText, reportList } from '@/lib/report/rules'

type Props = { page: ReportsPage; query: ListQuery }

/** Each signed report: its months, who signed when and with which meaning, the comb of its hash, its PDF. */
export function ReportList({ page, query }: Props) {
  return (
    <>
      <ListTools
        list={reportList}
        path="/reports"
        query={query}
        searchLabel="Find a report"
        placeholder="Case, study, storage"
        total={page.total}
        isDrawn
      />
      <ul className="mt-3 flex flex-col">
        {page.rows.map((r) => (
          <li
            key={r.signatureId}
            className={`grid gap-x-8 gap-y-3 border-b border-hair py-5 sm:grid-cols-[180px_1fr_auto] ${r.state === 'superseded' ? 'text-soft' : ''}`}
          >
            <p className="leading-none">
              <span className="text-64 font-430">{r.proposedMonths}</span>{' '}
              <span className="text-22">{r.proposedMonths === 1 ? 'month' : 'months'}</span>
            </p>
            <div className="min-w-0">
              <h2 className="text-20 font-650">{r.studyTitle}</h2>
              <p>
                {r.storageStatement}. Case {r.code}, study {r.studyCode}
                {r.state === 'superseded' ? ', superseded by a later case' : ''}.
              </p>
              <p className="mt-1">
                <b>Approved</b> by {r.personName}, {instantText(r.signedAt, r.zone)}
              </p>
              {r.belongs ? null : (
                <p className="mt-1 font-650 text-alarm">
                  This signature does not belong to this content any more. Do not use the report; ask the lab.
                </p>
              )}
              <div className="mt-3 max-w-[320px]">
                <HashComb sha256={r.contentSha256} width={286} height={24} />
                <p className="mt-1 break-words font-mono text-13">{hashGroups(r.contentSha256).join(' ')}</p>
              </div>
            </div>
            <div className="self-center">
              <LinkButton kind="primary" href={`/api/cases/${r.code}/report`} prefetch={false}>
                Open the report
              </LinkButton>
            </div>
          </li>
        ))}
      </ul>
      <ListPages list={reportList} path="/reports" query={query} page={page} />
    </>
  )
}
