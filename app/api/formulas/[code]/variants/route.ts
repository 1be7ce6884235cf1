import { makeVariants } from '@/lib/formula/commands/make-variants'
import { formulaAddress, makeVariantsInput } from '@/lib/formula/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'formula.write',
  params: formulaAddress,
  input: makeVariantsInput,
  handler: ({ db, actor, params, input }) => makeVariants(db, actor, params.code, input),
})
