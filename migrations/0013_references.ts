import { sql, type Kysely } from 'kysely'

/**
 * A bought-in product has a name and lots but no formula of ours: it stands in the formula table without lines, is
 * marked there, and its lots are batches. What stands beside a study as a reference is marked in that study.
 */
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table formula add column is_reference boolean not null default false;
    alter table batch add column product_lot text not null default '';
    alter table study_batch add column is_reference boolean not null default false;
  `.execute(db)
}
