import { listIngredientsNamed } from '@/lib/ingredient/queries'
import { ingredientNames } from '@/lib/ingredient/schema'
import { read } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: ingredientNames,
  handler: ({ db, actor, query }) => listIngredientsNamed(db, actor, query.name),
})
