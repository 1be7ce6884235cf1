import type { Metadata } from 'next'
import { ReportList } from '@/components/shelf-case/report-list'
import { Heading } from '@/components/ui/heading'
import { page } from '@/lib/http/page'
import { isNarrowed } from '@/lib/list/rules'
import { listReports } from '@/lib/report/queries'
import { reportList } from '@/lib/report/rules'

export const permission = 'report.read'
export const metadata: Metadata = { title: 'Reports' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function ReportsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = reportList.query.parse(await searchParams)
  const found = await listReports(db, actor, query)
  const latest = found.rows.find((r) => r.state === 'signed')
  return (
    <>
      <Heading
        crumb="Signed shelf-life reports"
        headline={
          latest ? (
            <>
              <b>{latest.proposedMonths} months</b> for {latest.studyTitle}
            </>
          ) : (
            <>{isNarrowed(reportList, query) ? 'No report is of that kind' : 'Nothing is signed yet'}</>
          )
        }
        sentence={
          latest
            ? `${latest.storageStatement}. Each report is made from the content that was signed, and from nothing else.`
            : 'When QA signs a shelf life of a study that is shared with you, its report stands here.'
        }
      />
      <div className="mt-5">
        <ReportList page={found} query={query} />
      </div>
    </>
  )
}
