import { download } from '@/lib/http/route'
import { exportList } from '@/lib/list/commands'
import { getStudyHead } from '@/lib/study/queries/head'
import { jarSource } from '@/lib/study/queries/jars'
import { jarList } from '@/lib/study/rules/jar-list'
import { studyAddress } from '@/lib/study/schema'

export const GET = download({
  permission: 'bench.read',
  params: studyAddress,
  query: jarList.fileQuery,
  handler: async ({ db, actor, params, query, now }) => {
    const { id, code } = await getStudyHead(db, actor, params.code)
    const source = jarSource(db, actor, id, query)
    return exportList(db, actor, now, { list: jarList, source, query, of: { code, studyId: id } })
  },
})
