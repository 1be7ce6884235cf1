import { sql } from 'kysely'
import type { Check } from './check'

/**
 * Every sealed row is hashed again with the hash before it. The stored hash of the row before is taken as
 * given, so that one altered row is named alone and not with all that follow.
 */
export const trailSeal: Check = {
  name: 'The trail against its seals',
  run: async (db) => {
    const { rows } = await sql<{ sentence: string }>`
      with chain as (
        select s.number, s.trail_id, s.hash,
          lag(s.hash, 1, '') over (order by s.number) as previous_hash,
          lag(s.number, 1, 0::bigint) over (order by s.number) as previous_number,
          lag(s.trail_id, 1, 0::bigint) over (order by s.number) as previous_id
        from trail_seal s
      )
      select case
          when t.id is null then format('Trail row %s was deleted.', c.trail_id)
          when c.hash is distinct from chain_hash(c.previous_hash, trail_row_text(t))
            then format('Trail row %s was changed, or its seal was.', c.trail_id)
          when c.number <> c.previous_number + 1 then format('Seal %s is missing.', c.previous_number + 1)
          else format('Seal %s is out of order.', c.number)
        end as sentence
      from chain c left join trail t on t.id = c.trail_id
      where t.id is null
        or c.hash is distinct from chain_hash(c.previous_hash, trail_row_text(t))
        or c.number <> c.previous_number + 1
        or c.trail_id <= c.previous_id
      union all
      select format('Trail row %s was put in after its place had been sealed.', t.id)
      from trail t
      where t.id <= (select max(trail_id) from trail_seal)
        and not exists (select from trail_seal s where s.trail_id = t.id)
    `.execute(db)
    return rows.map((row) => row.sentence)
  },
}

/** The last hash. Noted elsewhere, it also shows whether the whole chain was made anew. */
export async function headOfSeal(db: Parameters<Check['run']>[0]): Promise<string> {
  const head = await db
    .selectFrom('trailSeal')
    .select(['number', 'hash'])
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst()
  return head
    ? `${head.number} trail rows are sealed; the last seal is ${head.hash}.`
    : 'No trail row is sealed yet.'
}
