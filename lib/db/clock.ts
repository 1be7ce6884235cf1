import { sql } from 'kysely'
import type { Db } from './client'

/** The one clock, as the database tells it. */
export async function readClock(db: Db): Promise<string> {
  const { rows } = await sql<{ now: string }>`select app_now() as now`.execute(db)
  return rows[0]!.now
}
