import { trailSource } from '@/lib/trail/queries'
import { trailList } from '@/lib/trail/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'trail.read',
  query: trailList.fileQuery,
  handler: async ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: trailList, source: await trailSource(db, actor, query), query }),
})
