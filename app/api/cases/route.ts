import { read, write } from '@/lib/http/route'
import { draftCase } from '@/lib/shelf-case/commands/draft'
import { listCases } from '@/lib/shelf-case/queries/list'
import { caseList } from '@/lib/shelf-case/rules/list'
import { newCase } from '@/lib/shelf-case/schema'

export const GET = read({
  permission: 'case.read',
  query: caseList.query,
  handler: ({ db, actor, query }) => listCases(db, actor, query),
})

export const POST = write({
  permission: 'case.put-forward',
  input: newCase,
  handler: ({ db, actor, input }) => draftCase(db, actor, input),
})
