import { batchSource } from '@/lib/batch/queries/list-batches'
import { batchList } from '@/lib/batch/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'batch.read',
  query: batchList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: batchList, source: batchSource(db, actor, query), query }),
})
