import { saveFormula } from '@/lib/formula/commands/save-formula'
import { getFormula } from '@/lib/formula/queries/get-formula'
import { formulaAddress, formulaPageQuery, saveFormulaInput } from '@/lib/formula/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  params: formulaAddress,
  query: formulaPageQuery,
  handler: ({ db, actor, params, query }) => getFormula(db, actor, params.code, query.version),
})

export const PUT = write({
  permission: 'formula.write',
  params: formulaAddress,
  input: saveFormulaInput,
  handler: ({ db, actor, params, input }) => saveFormula(db, actor, params.code, input),
})
