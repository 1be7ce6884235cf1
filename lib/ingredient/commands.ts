import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { IngredientInput } from './schema'

/** Adds an ingredient; the same id again answers with what stands, the same name under another id is refused. */
export async function addIngredient(trx: Trx, _actor: Actor, input: IngredientInput) {
  const existing = await trx
    .selectFrom('ingredient')
    .select(['id', 'inciName'])
    .where((eb) =>
      eb.or([eb('id', '=', input.id), eb(sql`lower(inci_name)`, '=', input.inciName.toLowerCase())]),
    )
    .execute()
  const same = existing.find((row) => row.id === input.id)
  if (same && same.inciName === input.inciName) return same
  const taken = existing[0]
  if (taken) {
    throw refuse.conflict(`${taken.inciName} is already among the ingredients. Choose it from the list.`, {
      ingredientId: taken.id,
    })
  }
  return trx
    .insertInto('ingredient')
    .values({ ...input })
    .returning(['id', 'inciName'])
    .executeTakeFirstOrThrow()
}
