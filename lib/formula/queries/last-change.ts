import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'

export type LastChange = { by: string; initials: string; at: string; changed: string[] }

/**
 * Who saved a draft after the version that was on screen, and which lines and steps they changed: what a 412 tells.
 * Read from the trail, so it needs nothing kept beside it.
 */
export async function findDraftChange(
  trx: Db | Trx,
  formulaVersionId: string,
  sinceVersion: number,
): Promise<LastChange | null> {
  const { rows } = await sql<{ by: string; initials: string; at: string; changed: string[] | null }>`
    with saves as (
      select request_id, actor_id, at from trail
      where table_name = 'formula_version' and row_id = ${formulaVersionId} and operation = 'update'
        and (after->>'version')::int > ${sinceVersion}
    ), latest as (select * from saves order by at desc limit 1)
    select person.name as by, person.initials, latest.at, (
      select array_agg(distinct coalesce(t.after, t.before)->>(case t.table_name when 'formula_line' then 'inci_name' else 'instruction' end))
      from trail t join saves on saves.request_id = t.request_id
      where t.table_name in ('formula_line', 'formula_step')
        and coalesce(t.after, t.before)->>'formula_version_id' = ${formulaVersionId}
        -- A line that only moved because another came before it was not changed.
        and (t.before is null or t.after is null or t.before - 'position' <> t.after - 'position')
    ) as changed
    from latest join person on person.id = latest.actor_id
  `.execute(trx)
  const row = rows[0]
  return row ? { ...row, changed: row.changed ?? [] } : null
}
