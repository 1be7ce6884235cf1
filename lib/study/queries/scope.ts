import { sql, type RawBuilder } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'

/**
 * Whose studies: the lab sees all, a client those of its own firm that are shared. For the `where` of every query
 * that reads a study; what is not yours is then simply not there.
 */
export function studiesOf(actor: Actor): RawBuilder<boolean> {
  if (!isClientOnly(actor)) return sql<boolean>`true`
  return sql<boolean>`(study.client_id = ${actor.clientId}::uuid and study.is_shared)`
}
