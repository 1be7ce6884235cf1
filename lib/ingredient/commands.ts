import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { expectOne } from '@/lib/trail/queries'
import { tidySynonyms } from './rules'
import type { ChangedIngredient, IngredientInput } from './schema'

/** Adds an ingredient; the same id again answers with what stands, the same name under another id is refused. */
export async function addIngredient(trx: Trx, _actor: Actor, input: IngredientInput) {
  const existing = await findSame(trx, input)
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
    .values(rowOf(input))
    .returning(['id', 'inciName'])
    .executeTakeFirstOrThrow()
}

/** A whole book in one statement; names that are there already stay as they are. */
export async function addIngredients(trx: Trx, _actor: Actor, inputs: readonly IngredientInput[]) {
  if (!inputs.length) return
  await trx
    .insertInto('ingredient')
    .values(inputs.map(rowOf))
    .onConflict((conflict) => conflict.expression(sql`lower(inci_name)`).doNothing())
    .execute()
}

/** Changes the book's entry. Lines of formulas keep what they were written with. */
export async function changeIngredient(
  trx: Trx,
  _actor: Actor,
  id: string,
  { version, ...fields }: ChangedIngredient,
) {
  const found = await trx
    .selectFrom('ingredient')
    .select(['inciName', 'version'])
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst()
  if (!found) throw refuse.notFound('That ingredient is not in the book. Look for it in the list.')
  if (found.version !== version)
    await expectOne(trx, undefined, { table: 'ingredient', id, thing: found.inciName })
  const taken = (await findSame(trx, { id, inciName: fields.inciName })).find((row) => row.id !== id)
  if (taken) {
    throw refuse.invalid(`${taken.inciName} is already among the ingredients. Give this one another name.`, {
      inciName: 'This name is taken.',
    })
  }
  await trx
    .updateTable('ingredient')
    .set({ ...rowOf(fields), version: version + 1 })
    .where('id', '=', id)
    .execute()
  return { id, inciName: fields.inciName, version: version + 1 }
}

function findSame(trx: Trx, { id, inciName }: { id: string; inciName: string }) {
  return trx
    .selectFrom('ingredient')
    .select(['id', 'inciName'])
    .where((eb) => eb.or([eb('id', '=', id), eb(sql`lower(inci_name)`, '=', inciName.toLowerCase())]))
    .execute()
}

function rowOf<Fields extends { inciName: string; synonyms: string[] }>(fields: Fields): Fields {
  return { ...fields, synonyms: tidySynonyms(fields.inciName, fields.synonyms) }
}
