import Link from 'next/link'
import { Empty } from '@/components/ui/empty'
import { Ledger } from '@/components/ui/ledger'
import type { CaseRow } from '@/lib/shelf-case/queries/read'
import { dayText } from '@/lib/report/rules'

/** Cases, newest first; the last column says who is next. */
export function CaseList({ cases }: { cases: CaseRow[] }) {
  return (
    <Ledger
      caption="Shelf-life cases"
      rows={cases}
      rowKey={(c) => c.id}
      isQuiet={(c) => c.state === 'superseded' || c.state === 'sent back'}
      empty={
        <Empty
          title="No case is here yet"
          sentence="A formulator puts one forward from a study’s sheet once its readings carry a shelf life."
        />
      }
      columns={[
        {
          key: 'code',
          title: 'case',
          width: '90px',
          cell: (c) => (
            <Link className="font-650 underline-offset-4 hover:underline" href={`/cases/${c.code}`}>
              {c.code}
            </Link>
          ),
        },
        {
          key: 'study',
          title: 'study',
          cell: (c) => (
            <>
              <span className="font-650">{c.studyCode}</span> {c.studyTitle}
            </>
          ),
        },
        {
          key: 'months',
          title: 'months',
          align: 'right',
          cell: (c) => <b>{c.proposedMonths}</b>,
        },
        { key: 'storage', title: 'stored', from: 'desk', cell: (c) => c.storageStatement },
        { key: 'kind', title: 'kind', from: 'tablet', cell: (c) => c.kind },
        { key: 'state', title: 'stands at', cell: (c) => c.state },
        {
          key: 'next',
          title: 'who is next',
          from: 'tablet',
          cell: (c) => whoIsNext(c),
        },
      ]}
    />
  )
}

function whoIsNext(c: CaseRow): string {
  if (c.state === 'drafting') return 'formulator puts it forward'
  if (c.state === 'put forward') return 'QA signs or sends back'
  if (c.state === 'signed' && c.signedAt) return `signed ${dayText(c.signedAt)}`
  return 'nobody'
}
