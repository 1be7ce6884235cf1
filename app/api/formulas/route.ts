import { createFormula } from '@/lib/formula/commands/create-formula'
import { listFormulas } from '@/lib/formula/queries/list-formulas'
import { formulaList } from '@/lib/formula/rules/list'
import { createFormulaInput } from '@/lib/formula/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: formulaList.query,
  handler: ({ db, actor, query }) => listFormulas(db, actor, query),
})

export const POST = write({
  permission: 'formula.write',
  input: createFormulaInput,
  handler: ({ db, actor, input }) => createFormula(db, actor, input),
})
