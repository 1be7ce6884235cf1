import { instrumentSource } from '@/lib/instrument/queries/list'
import { instrumentList } from '@/lib/instrument/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'instrument.read',
  query: instrumentList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: instrumentList, source: instrumentSource(db, actor, query), query }),
})
