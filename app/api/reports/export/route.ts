import { reportSource } from '@/lib/report/queries'
import { reportList } from '@/lib/report/rules'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'report.read',
  query: reportList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: reportList, source: reportSource(db, actor, query), query }),
})
