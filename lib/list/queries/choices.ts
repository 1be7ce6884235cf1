import { sql } from 'kysely'
import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** What filters offer by name. A client is offered nothing: the names of others are not theirs to read. */
export async function listChoices(db: Db, actor: Actor) {
  if (isClientOnly(actor)) return { client: [], by: [], station: [], study: [] }
  const { rows } = await sql<{ client: string[]; by: string[]; station: string[]; study: string[] }>`
    select array(select name from client order by name collate natural_order) as client,
      array(select name from person where not is_system and not 'client' = any (roles)
        order by name collate natural_order) as by,
      array(select name from station order by walk_order, name collate natural_order) as station,
      array(select code from study order by code collate natural_order desc limit 500) as study
  `.execute(db)
  return rows[0]!
}
