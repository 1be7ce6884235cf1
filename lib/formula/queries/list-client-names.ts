import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** Clients that a formula can be written for. */
export function listClientNames(db: Db, _actor: Actor) {
  return db.selectFrom('client').select(['id', 'name']).orderBy('name').execute()
}
