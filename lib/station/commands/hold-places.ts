import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'

/** Whoever gives places away, at the start of a study or in a move, does so one after the other. */
export async function holdPlaces(trx: Trx): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtext('start of a study'))`.execute(trx)
}
