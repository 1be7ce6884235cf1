import { read, write } from '@/lib/http/route'
import { editCase } from '@/lib/shelf-case/commands/draft'
import { getCase } from '@/lib/shelf-case/queries/read'
import { caseCode, editedCase } from '@/lib/shelf-case/schema'

export const GET = read({
  permission: 'case.read',
  params: caseCode,
  handler: ({ db, actor, params }) => getCase(db, actor, params.code),
})

export const PUT = write({
  permission: 'case.put-forward',
  params: caseCode,
  input: editedCase,
  handler: ({ db, actor, params, input }) => editCase(db, actor, params.code, input),
})
