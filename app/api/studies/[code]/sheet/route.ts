import { read } from '@/lib/http/route'
import { getSheet } from '@/lib/study/queries/sheet'
import { studyAddress } from '@/lib/study/schema'

export const GET = read({
  permission: 'study.read',
  params: studyAddress,
  handler: ({ db, actor, params }) => getSheet(db, actor, params.code),
})
