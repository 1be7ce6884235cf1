import { read } from '@/lib/http/route'
import { listStudyReadings } from '@/lib/study/queries/readings'
import { readingList } from '@/lib/study/rules/reading-list'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'reading.read',
  params: studyAddress,
  query: readingList.query,
  handler: ({ db, actor, params, query }) => listStudyReadings(db, actor, params.code, query),
})
