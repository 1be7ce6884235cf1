import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { Check } from './check'

/** Every row must be as its last trail row left it; a column that only one of the two knows is not compared. */
export const trailRows: Check = {
  name: 'Every row against its last trail entry',
  run: async (db) => {
    const found: string[] = []
    for (const { table, key } of await trailedTables(db)) found.push(...(await compare(db, table, key)))
    return found
  },
}

async function trailedTables(db: Db): Promise<{ table: string; key: string }[]> {
  // The trigger's arguments name the key columns, separated by NUL as PostgreSQL keeps them.
  const { rows } = await sql<{ name: string; args: string }>`
    select c.relname as name, encode(g.tgargs, 'escape') as args
    from pg_trigger g join pg_class c on c.oid = g.tgrelid
    where g.tgname = 'trail' order by c.relname
  `.execute(db)
  return rows.map(({ name, args }) => ({ table: name, key: args.split('\\000')[0] ?? 'id' }))
}

async function compare(db: Db, table: string, key: string): Promise<string[]> {
  const { rows } = await sql<{ id: string; what: string }>`
    with last as (
      select distinct on (row_id) row_id, operation, after from trail
      where table_name = ${table} and operation <> 'event'
      order by row_id, id desc
    ), present as (
      select ${sql.ref(key)}::text as row_id, to_jsonb(r) as is_now from ${sql.table(table)} r
    )
    select coalesce(last.row_id, present.row_id) as id,
      case when last.row_id is null or last.operation = 'delete' then 'was put in' when present.row_id is null
        then 'was deleted' else 'was changed' end as what
    from last full join present using (row_id)
    where (last.row_id is null)
      or (present.row_id is null and last.operation <> 'delete')
      or (present.row_id is not null and last.operation = 'delete')
      or exists (
        select from jsonb_each(last.after) as kept (field, value)
        where is_now ? field and is_now -> field is distinct from value
      )
  `.execute(db)
  return rows.map(({ id, what }) => `Row ${id} of ${table} ${what} without the trail knowing.`)
}
