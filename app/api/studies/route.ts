import { read, write } from '@/lib/http/route'
import { startStudy } from '@/lib/study/commands/start-study'
import { listStudies } from '@/lib/study/queries/ledger'
import { studyList } from '@/lib/study/rules/list'
import { startedStudy } from '@/lib/study/schema'

export const GET = read({
  permission: 'study.read',
  query: studyList.query,
  handler: ({ db, actor, query }) => listStudies(db, actor, query),
})

export const POST = write({
  permission: 'study.write',
  input: startedStudy,
  handler: ({ db, actor, input }) => startStudy(db, actor, input),
})
