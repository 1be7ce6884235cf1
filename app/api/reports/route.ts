import { read } from '@/lib/http/route'
import { listReports } from '@/lib/report/queries'

export const GET = read({
  permission: 'report.read',
  handler: async ({ db, actor }) => {
    const rows = await listReports(db, actor)
    return rows.map(({ signedAt, personName, meaning, zone, ...row }) => ({
      ...row,
      signature: { personName, meaning, signedAt, zone },
    }))
  },
})
