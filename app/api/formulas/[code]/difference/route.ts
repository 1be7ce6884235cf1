import { getDifference } from '@/lib/formula/queries/get-difference'
import { differenceQuery, formulaAddress } from '@/lib/formula/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  params: formulaAddress,
  query: differenceQuery,
  handler: ({ db, actor, params, query }) => getDifference(db, actor, params.code, query),
})
