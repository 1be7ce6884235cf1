import { addIngredient } from '@/lib/ingredient/commands'
import { searchIngredients } from '@/lib/ingredient/queries'
import { ingredientInput, ingredientSearch } from '@/lib/ingredient/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  query: ingredientSearch,
  handler: ({ db, actor, query }) => searchIngredients(db, actor, query.q),
})

export const POST = write({
  permission: 'formula.write',
  input: ingredientInput,
  handler: ({ db, actor, input }) => addIngredient(db, actor, input),
})
