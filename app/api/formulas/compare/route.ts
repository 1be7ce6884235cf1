import { getComparison } from '@/lib/formula/queries/get-comparison'
import { compareQuery } from '@/lib/formula/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: compareQuery,
  handler: ({ db, actor, query }) => getComparison(db, actor, query.code),
})
