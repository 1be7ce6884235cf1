import { changeIngredient } from '@/lib/ingredient/commands'
import { getIngredient } from '@/lib/ingredient/queries'
import { changedIngredient, ingredientAddress } from '@/lib/ingredient/schema'
import { read, write } from '@/lib/http/route'

export const GET = read({
  permission: 'formula.read',
  params: ingredientAddress,
  handler: ({ db, actor, params }) => getIngredient(db, actor, params.id),
})

export const PUT = write({
  permission: 'formula.write',
  params: ingredientAddress,
  input: changedIngredient,
  handler: ({ db, actor, params, input }) => changeIngredient(db, actor, params.id, input),
})
