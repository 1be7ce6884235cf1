import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

export async function listClients(db: Db, _actor: Actor) {
  return db.selectFrom('client').select(['id', 'name', 'version']).orderBy('name').execute()
}

export type ClientRow = Awaited<ReturnType<typeof listClients>>[number]
