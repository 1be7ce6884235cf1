import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** Rows of the trail that never change what the Bench shows. */
const elsewhere = [
  ...['formula', 'formula_answer', 'formula_line', 'formula_step', 'formula_version', 'ingredient'],
  ...['batch', 'batch_portion', 'batch_step', 'batch_step_entry', 'batch_weighing', 'client', 'person'],
  ...['protocol', 'protocol_version', 'report', 'shelf_case', 'signature', 'photo', 'study_follower'],
]
const blockRows = 1000

/**
 * One text that is another as soon as anything the Bench shows has changed. The trail's serial number is not commit
 * order: a row may come to light below one that was seen already. So the rows of the last one to two thousand are counted
 * beside their greatest; a transaction that stays open while two thousand rows are written past it would be missed
 * until the next change.
 */
export async function getRevision(db: Db, _actor: Actor) {
  const { rows } = await sql<{ revision: string; today: string }>`
    with recent as (select greatest(0, coalesce(max(id), 0) / ${sql.lit(blockRows)} - 1) * ${sql.lit(blockRows)} as from_id
      from trail)
    select recent.from_id || '.' || count(trail.id) || '.' || coalesce(max(trail.id), 0) as revision,
        (app_now() at time zone coalesce((select time_zone from lab limit 1), 'UTC'))::date as today
      from recent
      left join trail on trail.id > recent.from_id and coalesce(trail.table_name, '') <> ''
        and trail.table_name <> all(${elsewhere})
      group by recent.from_id
  `.execute(db)
  return rows[0]!
}
