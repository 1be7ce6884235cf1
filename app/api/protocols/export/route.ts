import { protocolSource } from '@/lib/protocol/queries'
import { protocolList } from '@/lib/protocol/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'protocol.read',
  query: protocolList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: protocolList, source: protocolSource(db, actor, query), query }),
})
