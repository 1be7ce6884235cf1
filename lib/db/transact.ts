import { sql } from 'kysely'
import type { Db, Trx } from './client'

export type Context = {
  reason?: string | undefined
  requestId?: string | undefined
  /** Only the seeding role may; the trail marks what was written under a shifted clock. */
  shiftedTo?: Date | undefined
}

/** One transaction with an actor: without one the trail's trigger refuses every write. */
export function transact<T>(
  db: Db,
  actor: { personId: string },
  context: Context,
  work: (trx: Trx, now: string) => Promise<T>,
): Promise<T> {
  return db.transaction().execute(async (trx) => work(trx, await setContext(trx, actor, context)))
}

async function setContext(trx: Trx, actor: { personId: string }, context: Context): Promise<string> {
  if (context.shiftedTo)
    await sql`
      select set_config('app.clock_shift', (${context.shiftedTo.toISOString()}::timestamptz - now())::text, true)
    `.execute(trx)
  const { rows } = await sql<{ now: string }>`
    select set_config('app.actor_id', ${actor.personId}, true),
      set_config('app.reason', ${context.reason ?? ''}, true),
      set_config('app.request_id', ${context.requestId ?? ''}, true),
      app_now() as now
  `.execute(trx)
  return rows[0]!.now
}
