import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'

export type LabDay = { zone: string; now: string; today: string }

/** The lab's zone, the server's time, and which day that is in the lab. */
export async function getLabDay(db: Db | Trx): Promise<LabDay> {
  const { rows } = await sql<LabDay>`
    select zone, app_now() as now, (app_now() at time zone zone)::date as today
      from (select coalesce((select time_zone from lab limit 1), 'UTC') as zone) as lab
  `.execute(db)
  return rows[0]!
}
