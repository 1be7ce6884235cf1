import { sql, type Kysely } from 'kysely'

// The pH a formula is meant to have, the protocol a batch was sized for, and what the microscope showed of a batch.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table formula_version
      -- One value where both are the same.
      add column target_ph_low numeric check (target_ph_low between 0 and 14),
      add column target_ph_high numeric check (target_ph_high between 0 and 14),
      add check ((target_ph_low is null) = (target_ph_high is null)),
      add check (target_ph_low <= target_ph_high);
    comment on column formula_answer.value is 'The target pH in answers given before it became a field of the version';

    -- Whose tolerance its weights are held to; null where the lab's own or a typed one counts.
    alter table batch add column protocol_version_id uuid references protocol_version (id);

    create table batch_photo (
      id uuid primary key,
      batch_id uuid not null references batch (id),
      sha256 text not null,
      bytes integer not null,
      type text not null,
      width integer not null,
      height integer not null,
      original_name text not null default '',
      note text not null default '',
      taken_by uuid not null references person (id),
      taken_at timestamptz not null,
      recorded_at timestamptz not null default app_now()
    );
    create index batch_photo_batch on batch_photo (batch_id);
    select add_trail('batch_photo'), grant_app('batch_photo', 'select, insert'), append_only('batch_photo');
  `.execute(db)
  await sql`
    select set_config('app.actor_id', '00000000-0000-7000-8000-000000000001', true),
      set_config('app.reason', 'The target pH became a field of the version; until then an answer brought it', true),
      set_config('app.request_id', 'migration 0012', true)
  `.execute(db)
  await sql`
    update formula_version set target_ph_low = given.value, target_ph_high = given.value
    from (
      select distinct on (formula_version_id) formula_version_id, value from formula_answer
      where question = 'ph' and value is not null
      order by formula_version_id, answered_at desc, id desc
    ) as given
    where given.formula_version_id = formula_version.id
  `.execute(db)
}
