import { newFormulaVersion } from '@/lib/formula/commands/new-version'
import { formulaAddress, newVersionInput } from '@/lib/formula/schema'
import { write } from '@/lib/http/route'

export const POST = write({
  permission: 'formula.write',
  params: formulaAddress,
  input: newVersionInput,
  handler: ({ db, actor, params, input }) => newFormulaVersion(db, actor, params.code, input),
})
