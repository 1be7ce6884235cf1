import { sql, type Kysely } from 'kysely'

export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    create table station (
      id uuid primary key,
      name text not null unique,
      kind text not null check (kind in ('temperature','freeze-thaw','transport')),
      temperature_c numeric,
      low_c numeric,
      high_c numeric,
      humidity_percent numeric,
      cycle_low_c numeric,
      cycle_high_c numeric,
      walk_order integer not null,
      shelves integer not null default 4 check (shelves > 0),
      places_per_shelf integer not null default 20 check (places_per_shelf > 0),
      caution text not null default '',
      is_active boolean not null default true,
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );

    create table station_temperature (
      id uuid primary key,
      station_id uuid not null references station (id),
      measured_at timestamptz not null,
      temperature_c numeric not null check (temperature_c > -273.15),
      source text not null default 'typed' check (source in ('typed','logger')),
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now()
    );
    create index station_temperature_time on station_temperature (station_id, measured_at);

    create table instrument (
      id uuid primary key,
      code text not null unique,
      kind text not null check (kind in ('meter','viscometer','balance')),
      name text not null,
      spindles jsonb not null default '[]',
      is_active boolean not null default true,
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );

    create table calibration (
      id uuid primary key,
      instrument_id uuid not null references instrument (id),
      calibrated_at timestamptz not null,
      due_on date not null,
      result text not null check (result in ('good','doubtful')),
      detail jsonb not null default '{}',
      note text not null default '',
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now()
    );
    create index calibration_instrument on calibration (instrument_id, calibrated_at desc);

    create table protocol (
      id uuid primary key,
      code text not null unique,
      name text not null,
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now()
    );

    create table protocol_version (
      id uuid primary key,
      protocol_id uuid not null references protocol (id),
      number integer not null,
      state text not null default 'draft' check (state in ('draft','locked')),
      plan jsonb not null,
      note text not null default '',
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now(),
      unique (protocol_id, number)
    );

    create table study (
      id uuid primary key,
      code text not null unique,
      title text not null,
      protocol_version_id uuid not null references protocol_version (id),
      plan jsonb not null,
      client_id uuid references client (id),
      is_shared boolean not null default false,
      state text not null default 'running' check (state in ('running','closed')),
      started_at timestamptz not null,
      started_on date not null,
      ended_on date,
      end_weeks numeric not null,
      fill_g numeric not null,
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now()
    );

    create table study_batch (
      id uuid primary key,
      study_id uuid not null references study (id),
      batch_id uuid not null references batch (id),
      position integer not null,
      unique (study_id, batch_id)
    );
    create index study_batch_batch on study_batch (batch_id);

    create table study_station (
      id uuid primary key,
      study_id uuid not null references study (id),
      station_id uuid not null references station (id),
      position integer not null,
      voice text not null check (voice in ('decides','informs','supports')),
      is_freeze_thaw boolean not null default false,
      temperature_c numeric,
      unique (study_id, station_id)
    );

    create table study_follower (
      id uuid primary key,
      study_id uuid not null references study (id),
      person_id uuid not null references person (id),
      unique (study_id, person_id)
    );

    -- One pull is one station of one study at one time point, for all its batches.
    create table pull (
      id uuid primary key,
      study_id uuid not null references study (id),
      study_station_id uuid not null references study_station (id),
      time_weeks numeric not null,
      label text not null,
      due_on date not null,
      window_from date not null,
      window_to date not null,
      unique (study_station_id, time_weeks)
    );
    create index pull_due on pull (due_on);

    create table jar (
      id uuid primary key,
      code text not null unique,
      study_id uuid not null references study (id),
      batch_id uuid not null references batch (id),
      study_station_id uuid references study_station (id),
      kind text not null check (kind in ('watch','measuring','spare','retain')),
      state text not null default 'stored' check (state in ('stored','pulled','resting','spent','kept','lost')),
      shelf integer,
      place integer,
      tare_g numeric,
      gross_g numeric,
      fill_height_mm numeric,
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );
    create index jar_study on jar (study_id);
    create index jar_station on jar (study_station_id);

    -- What is asked of one jar in one pull: the line that the Bench shows.
    create table pull_jar (
      id uuid primary key,
      pull_id uuid not null references pull (id),
      jar_id uuid not null references jar (id),
      study_id uuid not null references study (id),
      asks text not null check (asks in ('watch','measuring','repeat')),
      state text not null default 'due' check (state in ('due','resting','done','missed')),
      opened_by uuid references person (id),
      opened_at timestamptz,
      taken_at timestamptz,
      rest_until timestamptz,
      closed_at timestamptz,
      closed_by uuid references person (id),
      missed_reason text,
      repeat_of uuid references pull_jar (id),
      attribute text,
      note text not null default '',
      version integer not null default 1,
      unique (pull_id, jar_id, asks)
    );
    create index pull_jar_state on pull_jar (state, pull_id);
    create index pull_jar_study on pull_jar (study_id);

    create table cycle_step (
      id uuid primary key,
      study_station_id uuid not null references study_station (id),
      cycle integer not null check (cycle > 0),
      half text not null check (half in ('cold','warm')),
      begun_at timestamptz not null,
      ended_at timestamptz not null,
      reached_c numeric,
      is_frozen_through boolean,
      note text not null default '',
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (ended_at >= begun_at)
    );
    create index cycle_step_station on cycle_step (study_station_id);
  `.execute(db)
  const appendOnly = ['station_temperature', 'calibration', 'cycle_step']
  for (const table of [
    ...appendOnly,
    'station',
    'instrument',
    'protocol',
    'protocol_version',
    'study',
    'study_batch',
    'study_station',
    'study_follower',
    'pull',
    'jar',
    'pull_jar',
  ]) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert')`.execute(db)
    if (appendOnly.includes(table)) await sql`select append_only(${table})`.execute(db)
    else await sql`select grant_app(${table}, 'update')`.execute(db)
  }
  await sql`select grant_app('study_follower', 'delete')`.execute(db)
}
