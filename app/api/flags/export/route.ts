import { flagSource } from '@/lib/flag/queries/list'
import { flagList } from '@/lib/flag/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'reading.read',
  query: flagList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: flagList, source: flagSource(db, actor, query), query }),
})
