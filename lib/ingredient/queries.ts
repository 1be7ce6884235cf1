import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** At most twelve ingredients: names that begin with what was typed first, then those that contain it. */
export async function searchIngredients(db: Db, _actor: Actor, q: string) {
  const typed = q
    .trim()
    .toLowerCase()
    .replace(/[\\%_]/g, '\\$&')
  return db
    .selectFrom('ingredient')
    .select(['id', 'inciName', 'function', 'density', 'isOilPhase', 'priceCentsPerKg', 'caution'])
    .where(sql<boolean>`lower(inci_name) like ${`%${typed}%`}`)
    .orderBy(sql`lower(inci_name) not like ${`${typed}%`}`)
    .orderBy(sql`lower(inci_name)`)
    .limit(12)
    .execute()
}

export type IngredientRow = Awaited<ReturnType<typeof searchIngredients>>[number]

/** Those of the names that are among the ingredients, whatever their capitals. */
export async function listIngredientsNamed(db: Db, _actor: Actor, names: readonly string[]) {
  const wanted = names.map((name) => name.trim().toLowerCase())
  if (!wanted.length) return []
  return db
    .selectFrom('ingredient')
    .select(['id', 'inciName', 'function', 'density', 'isOilPhase', 'priceCentsPerKg', 'caution'])
    .where(sql<string>`lower(inci_name)`, 'in', wanted)
    .execute()
}
