import { read } from '@/lib/http/route'
import { listReports } from '@/lib/report/queries'
import { reportList } from '@/lib/report/rules'

export const GET = read({
  permission: 'report.read',
  query: reportList.query,
  handler: async ({ db, actor, query }) => {
    const page = await listReports(db, actor, query)
    const rows = page.rows.map(({ signedAt, personName, meaning, zone, ...row }) => ({
      ...row,
      signature: { personName, meaning, signedAt, zone },
    }))
    return { ...page, rows }
  },
})
