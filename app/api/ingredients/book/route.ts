import { listIngredientBook } from '@/lib/ingredient/queries'
import { ingredientList } from '@/lib/ingredient/rules'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: ingredientList.query,
  handler: ({ db, actor, query }) => listIngredientBook(db, actor, query),
})
