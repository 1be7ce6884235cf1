'use client'

import Link from 'next/link'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import type { ListQuery } from '@/lib/list/schema'
import type { CaseRow, CasesPage } from '@/lib/shelf-case/queries/list'
import { caseList } from '@/lib/shelf-case/rules/list'

type Props = { page: CasesPage; query: ListQuery; timeZone: string }

/** Cases, newest first; the last column says who is next. */
export function CaseList({ page, query, timeZone }: Props) {
  return (
    <>
      <ListTools
        list={caseList}
        path="/cases"
        query={query}
        choices={page.choices}
        searchLabel="Find a case"
        placeholder="Case, study, client, storage"
        total={page.total}
      />
      <div className="mt-3">
        <ListLedger
          list={caseList}
          path="/cases"
          query={query}
          page={page}
          caption="Shelf-life cases"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          isQuiet={(row) => row.state === 'superseded' || row.state === 'sent back'}
          cells={cells}
          empty={
            page.counts.all > 0 ? (
              <Empty
                title={query.q ? `No case has ${query.q}.` : 'No case is of that kind.'}
                act={<LinkButton href="/cases">Show all cases</LinkButton>}
              />
            ) : (
              <Empty
                title="No case is here yet"
                sentence="A formulator puts one forward from a study’s sheet once its readings carry a shelf life."
              />
            )
          }
        />
      </div>
    </>
  )
}

const cells: Parameters<typeof ListLedger<CaseRow>>[0]['cells'] = {
  code: {
    width: '90px',
    cell: (row) => (
      <Link className="font-650 underline-offset-4 hover:underline" href={`/cases/${row.code}`}>
        {row.code}
      </Link>
    ),
  },
  study: {
    cell: (row) => (
      <>
        <span className="font-650">{row.studyCode}</span> {row.studyTitle}
      </>
    ),
  },
  months: { cell: (row) => <b>{row.proposedMonths}</b> },
  storage: { from: 'desk' },
  kind: { from: 'tablet' },
  next: { from: 'tablet' },
}
