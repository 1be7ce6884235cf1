import { write } from '@/lib/http/route'
import { putCaseForward } from '@/lib/shelf-case/commands/put-forward'
import { caseCode, putForward } from '@/lib/shelf-case/schema'

export const POST = write({
  permission: 'case.put-forward',
  params: caseCode,
  input: putForward,
  handler: ({ db, actor, params, input }) => putCaseForward(db, actor, params.code, input),
})
