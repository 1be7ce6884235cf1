import { caseSource } from '@/lib/shelf-case/queries/list'
import { caseList } from '@/lib/shelf-case/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'case.read',
  query: caseList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: caseList, source: caseSource(db, actor, query), query }),
})
