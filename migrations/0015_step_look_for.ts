import { sql, type Kysely } from 'kysely'

export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table formula_step add column look_for text not null default '';
    comment on column formula_step.look_for is 'What tells by eye or hand that the step went well.';
  `.execute(db)
}
