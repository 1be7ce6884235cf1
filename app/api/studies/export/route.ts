import { studySource } from '@/lib/study/queries/ledger'
import { studyList } from '@/lib/study/rules/list'
import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'

export const GET = download({
  permission: 'study.read',
  query: studyList.fileQuery,
  handler: ({ db, actor, query, now }) =>
    exportList(db, actor, now, { list: studyList, source: studySource(db, actor, query), query }),
})
