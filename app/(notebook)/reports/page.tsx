import type { Metadata } from 'next'
import { ReportList } from '@/components/shelf-case/report-list'
import { Heading } from '@/components/ui/heading'
import { page } from '@/lib/http/page'
import { listReports } from '@/lib/report/queries'

export const permission = 'report.read'
export const metadata: Metadata = { title: 'Reports' }

export default async function ReportsPage() {
  const { actor, db } = await page(permission)
  const reports = await listReports(db, actor)
  const latest = reports.find((r) => r.state === 'signed')
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
            <>Nothing is signed yet</>
          )
        }
        sentence={
          latest
            ? `${latest.storageStatement}. Each report is made from the content that was signed, and from nothing else.`
            : 'When QA signs a shelf life of a study that is shared with you, its report stands here.'
        }
      />
      <div className="mt-8">
        <ReportList reports={reports} />
      </div>
    </>
  )
}
