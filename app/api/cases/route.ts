import { read, write } from '@/lib/http/route'
import { draftCase } from '@/lib/shelf-case/commands/draft'
import { listCases } from '@/lib/shelf-case/queries/read'
import { newCase } from '@/lib/shelf-case/schema'

export const GET = read({
  permission: 'case.read',
  handler: ({ db, actor }) => listCases(db, actor),
})

export const POST = write({
  permission: 'case.put-forward',
  input: newCase,
  handler: ({ db, actor, input }) => draftCase(db, actor, input),
})
