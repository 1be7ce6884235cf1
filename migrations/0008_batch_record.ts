import { sql, type Kysely } from 'kysely'

// What was done at the mixer, row by row: sub-weighings, presses of a step, jars as they are filled, readings of the batch.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    -- Batches of before were judged by half a percent; what is made from now on by the lab's own tolerance.
    alter table batch add column tolerance_percent numeric not null default 0.5
      check (tolerance_percent > 0 and tolerance_percent <= 10);
    alter table batch alter column tolerance_percent set default 1;

    create table batch_portion (
      id uuid primary key,
      batch_weighing_id uuid not null references batch_weighing (id),
      -- As typed; net = gross less tare. A net of 0 is a correction: it did not go in.
      gross_typed text not null,
      tare_typed text not null default '',
      net_g numeric not null check (net_g >= 0),
      -- The line is kept with this one; else another portion follows.
      is_last boolean not null,
      lot text not null default '',
      balance text not null default '',
      balance_id uuid references instrument (id),
      -- What was doubtful about the balance when it was used.
      balance_doubt text,
      note text not null default '',
      supersedes uuid unique references batch_portion (id),
      reason text not null default '',
      is_from_paper boolean not null default false,
      weighed_at timestamptz not null default app_now(),
      recorded_at timestamptz not null default app_now(),
      weighed_by uuid not null references person (id),
      check (supersedes is null or reason <> ''),
      check (net_g > 0 or supersedes is not null)
    );
    create index batch_portion_line on batch_portion (batch_weighing_id);

    create table batch_step_entry (
      id uuid primary key,
      batch_step_id uuid not null references batch_step (id),
      kind text not null check (kind in ('start','end','done')),
      actual_speed_rpm integer,
      actual_minutes numeric,
      actual_temperature_c numeric,
      note text not null default '',
      reason text not null default '',
      is_from_paper boolean not null default false,
      happened_at timestamptz not null default app_now(),
      recorded_at timestamptz not null default app_now(),
      recorded_by uuid not null references person (id)
    );
    create index batch_step_entry_step on batch_step_entry (batch_step_id);

    create table batch_jar (
      id uuid primary key,
      batch_id uuid not null references batch (id),
      number integer not null check (number > 0),
      tare_g numeric not null check (tare_g >= 0),
      gross_g numeric not null check (gross_g > tare_g),
      torque_nm numeric check (torque_nm >= 0),
      note text not null default '',
      supersedes uuid unique references batch_jar (id),
      reason text not null default '',
      is_from_paper boolean not null default false,
      filled_at timestamptz not null default app_now(),
      recorded_at timestamptz not null default app_now(),
      filled_by uuid not null references person (id),
      check (supersedes is null or reason <> '')
    );
    create unique index batch_jar_once on batch_jar (batch_id, number) where supersedes is null;

    create table batch_reading (
      id uuid primary key,
      batch_id uuid not null references batch (id),
      moment text not null check (moment in ('in process','initial')),
      attribute text not null
        check (attribute in ('look','ph','viscosity','density','centrifuge','droplets','temperature')),
      replicate integer not null check (replicate between 1 and 99),
      typed text not null,
      -- Null where words say it.
      value numeric,
      detail jsonb not null default '{}',
      instrument_id uuid references instrument (id),
      instrument_doubt text,
      note text not null default '',
      supersedes uuid unique references batch_reading (id),
      -- Why it was corrected, or read before the rest was over.
      reason text not null default '',
      is_from_paper boolean not null default false,
      read_at timestamptz not null default app_now(),
      recorded_at timestamptz not null default app_now(),
      read_by uuid not null references person (id),
      check (supersedes is null or reason <> '')
    );
    create unique index batch_reading_once on batch_reading (batch_id, moment, attribute, replicate)
      where supersedes is null;
  `.execute(db)
  for (const table of ['batch_portion', 'batch_step_entry', 'batch_jar', 'batch_reading'])
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert'), append_only(${table})`.execute(
      db,
    )
  // What was weighed and done before stands as rows too, and each row on the trail says where it came from.
  await sql`
    select set_config('app.actor_id', '00000000-0000-7000-8000-000000000001', true),
      set_config('app.reason', 'Carried over when portions and presses became rows of their own', true),
      set_config('app.request_id', 'migration 0008', true)
  `.execute(db)
  await sql`
    insert into batch_portion (id, batch_weighing_id, gross_typed, net_g, is_last, lot, balance, note,
        weighed_at, recorded_at, weighed_by)
      select gen_random_uuid(), id, coalesce(actual_typed, actual_g::text), actual_g, true, lot, balance, note,
        weighed_at, weighed_at, weighed_by
      from batch_weighing where actual_g > 0 and weighed_by is not null and weighed_at is not null;
    insert into batch_step_entry (id, batch_step_id, kind, actual_speed_rpm, actual_minutes, actual_temperature_c,
        note, happened_at, recorded_at, recorded_by)
      select gen_random_uuid(), id, 'done', actual_speed_rpm, actual_minutes, actual_temperature_c, note,
        done_at, done_at, done_by
      from batch_step where done_at is not null and done_by is not null;
  `.execute(db)
}
