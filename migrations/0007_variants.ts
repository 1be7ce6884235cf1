import { sql, type Kysely } from 'kysely'

// A family of prototypes: which version they were varied from, and at which levels.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table formula
      add column family_of_version_id uuid references formula_version (id),
      -- [{ phase, inciName, percentThousandths }], the lines that were varied.
      add column levels jsonb not null default '[]';
    create index formula_family on formula (family_of_version_id) where family_of_version_id is not null;
  `.execute(db)
}
