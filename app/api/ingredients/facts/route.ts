import { listIngredientFacts } from '@/lib/ingredient/queries'
import { ingredientIds } from '@/lib/ingredient/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: ingredientIds,
  handler: ({ db, actor, query }) => listIngredientFacts(db, actor, query.id),
})
