import { download } from '@/lib/http/route'
import { renderReport } from '@/lib/report/document/report'
import { getReportInput } from '@/lib/report/queries'
import { caseCode } from '@/lib/shelf-case/schema'

export const GET = download({
  permission: 'report.read',
  params: caseCode,
  handler: async ({ db, actor, params }) => ({
    body: await renderReport(await getReportInput(db, actor, params.code)),
    type: 'application/pdf',
    fileName: `shelf-life-${params.code}.pdf`,
    inline: true,
  }),
})
