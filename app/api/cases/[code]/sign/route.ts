import { write } from '@/lib/http/route'
import { signCase } from '@/lib/shelf-case/commands/sign'
import { caseCode, caseSignature } from '@/lib/shelf-case/schema'

export const POST = write({
  permission: 'case.sign',
  params: caseCode,
  input: caseSignature,
  handler: ({ db, actor, params, input }) => signCase(db, actor, params.code, input),
})
