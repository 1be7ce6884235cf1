import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'
import { getStudyHead } from '@/lib/study/queries/head'
import { readingSource } from '@/lib/study/queries/readings'
import { readingList } from '@/lib/study/rules/reading-list'
import { studyAddress } from '@/lib/study/schema'

export const GET = download({
  permission: 'reading.read',
  params: studyAddress,
  query: readingList.fileQuery,
  handler: async ({ db, actor, params, query, now }) => {
    const { id, code } = await getStudyHead(db, actor, params.code)
    const source = readingSource(db, id, query)
    return exportList(db, actor, now, { list: readingList, source, query, of: { code, studyId: id } })
  },
})
