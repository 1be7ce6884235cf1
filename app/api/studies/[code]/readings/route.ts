import { read } from '@/lib/http/route'
import { getStudyReadings } from '@/lib/study/queries/readings'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'reading.read',
  params: studyAddress,
  handler: ({ db, actor, params }) => getStudyReadings(db, actor, params.code),
})
