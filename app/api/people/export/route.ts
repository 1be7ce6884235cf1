import { personSource } from '@/lib/person/queries'
import { personList } from '@/lib/person/rules'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'person.manage',
  query: personList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: personList, source: personSource(db, actor, query), query }),
})
