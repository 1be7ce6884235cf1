import { sql, type Kysely } from 'kysely'

/**
 * Freeze-thaw by its presses, temperatures by a logger's file, and instruments by their daily checks and by the lots of
 * what they are checked with. A doubt that an instrument brings on readings already taken is a row of its own: readings
 * never change.
 */
export async function up(db: Kysely<any>): Promise<void> {
  await cycles(db)
  await temperatures(db)
  await instruments(db)
  const appendOnly = ['cycle_press', 'logger_file', 'instrument_check', 'reading_doubt']
  for (const table of [...appendOnly, 'lot']) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert')`.execute(db)
    if (appendOnly.includes(table)) await sql`select append_only(${table})`.execute(db)
  }
  await sql`select grant_app('lot', 'update')`.execute(db)
}

async function cycles(db: Kysely<any>): Promise<void> {
  await sql`
    -- What was pressed at the board: a half begins, is held (over a weekend) and goes on. Its end makes it a whole half,
    -- which is a cycle_step as before.
    create table cycle_press (
      id uuid primary key,
      study_station_id uuid not null references study_station (id),
      cycle integer not null check (cycle > 0),
      half text not null check (half in ('cold','warm')),
      press text not null check (press in ('begin','hold','go on')),
      at timestamptz not null,
      -- What the person or the tablet said; at is the server's time where nothing earlier was given.
      claimed_at timestamptz,
      reason text not null default '',
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (at <= recorded_at),
      check (press <> 'hold' or length(btrim(reason)) > 0)
    );
    create unique index cycle_press_begin on cycle_press (study_station_id, cycle, half) where press = 'begin';

    alter table cycle_step
      -- Null where a whole half was typed later from paper.
      add column begin_press_id uuid references cycle_press (id),
      add column core_c numeric,
      add column held_hours numeric not null default 0,
      add column claimed_at timestamptz;
  `.execute(db)
}

async function temperatures(db: Kysely<any>): Promise<void> {
  await sql`
    create table logger_file (
      id uuid primary key,
      station_id uuid not null references station (id),
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      bytes integer not null,
      original_name text not null default '',
      -- How it was read: delimiter, decimal sign, columns, order of the date, unit, time zone.
      read_as jsonb not null,
      taken_rows integer not null,
      known_rows integer not null,
      bad_rows integer not null,
      from_at timestamptz not null,
      to_at timestamptz not null,
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now()
    );
    create index logger_file_station on logger_file (station_id, recorded_at);
    alter table station_temperature add column logger_file_id uuid references logger_file (id);
  `.execute(db)
}

async function instruments(db: Kysely<any>): Promise<void> {
  await sql`
    -- A bottle of buffer or check fluid, with the values of its own certificate.
    create table lot (
      id uuid primary key,
      kind text not null check (kind in ('buffer','check fluid')),
      name text not null check (length(btrim(name)) > 0),
      lot text not null check (length(btrim(lot)) > 0),
      -- [{temperatureC, value}]: pH or mPa·s.
      certificate jsonb not null,
      expires_on date not null,
      opened_on date,
      keeps_days integer check (keeps_days > 0),
      is_used_up boolean not null default false,
      version integer not null default 1,
      recorded_by uuid not null references person (id),
      created_at timestamptz not null default app_now(),
      unique (kind, name, lot)
    );

    alter table instrument add column daily_check jsonb;

    create table instrument_check (
      id uuid primary key,
      instrument_id uuid not null references instrument (id),
      checked_at timestamptz not null,
      claimed_at timestamptz,
      result text not null check (result in ('good','doubtful')),
      detail jsonb not null,
      lot_id uuid references lot (id),
      note text not null default '',
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (checked_at <= recorded_at)
    );
    create index instrument_check_instrument on instrument_check (instrument_id, checked_at desc);

    -- Found after the reading was taken: the calibration or check that proved bad reaches back to the last good one.
    create table reading_doubt (
      id uuid primary key,
      reading_id uuid not null references reading (id),
      reason text not null,
      sentence text not null,
      calibration_id uuid references calibration (id),
      instrument_check_id uuid references instrument_check (id),
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (num_nonnulls(calibration_id, instrument_check_id) = 1)
    );
    create unique index reading_doubt_once on reading_doubt
      (reading_id, calibration_id, instrument_check_id) nulls not distinct;
    create index reading_instrument on reading (instrument_id, measured_at) where instrument_id is not null;
  `.execute(db)
}
