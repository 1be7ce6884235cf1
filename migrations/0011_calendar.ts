import { sql, type Kysely } from 'kysely'

// On which days the lab works, and the label sheet it has had made for itself.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    -- 1 is Monday, 7 is Sunday. A lab that has said nothing works every day, so no pull is moved.
    alter table lab
      add column working_days integer[] not null default '{1,2,3,4,5,6,7}'
        check (cardinality(working_days) > 0 and working_days <@ '{1,2,3,4,5,6,7}'::integer[]),
      add column label_grid jsonb;

    create table holiday (
      id uuid primary key,
      day date not null unique,
      name text not null check (length(btrim(name)) > 0),
      added_by uuid not null references person (id),
      added_at timestamptz not null default app_now()
    );

    select add_trail('holiday'), grant_app('holiday', 'select, insert, delete');
  `.execute(db)
}
