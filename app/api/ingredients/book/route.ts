import { listIngredientBook } from '@/lib/ingredient/queries'
import { ingredientBookQuery } from '@/lib/ingredient/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: ingredientBookQuery,
  handler: ({ db, actor, query }) => listIngredientBook(db, actor, query),
})
