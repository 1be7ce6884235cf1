import { sql, type Kysely } from 'kysely'

// Stations: lamps, planned downtime, and jars that stand elsewhere than where their study began.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table station
      add column light_lux numeric check (light_lux > 0),
      add column light_uv_wm2 numeric check (light_uv_wm2 > 0),
      add column light_hours numeric check (light_hours > 0 and light_hours <= 24),
      add constraint station_light check ((light_hours is null) = (light_lux is null and light_uv_wm2 is null));

    -- Where a jar stands. Its series stays that of study_station_id, wherever the jar is moved.
    alter table jar add column station_id uuid references station (id);
    select set_config('app.actor_id', '00000000-0000-7000-8000-000000000001', true);
    update jar set station_id = ss.station_id from study_station ss where ss.id = jar.study_station_id;
    alter table jar add constraint jar_stands_somewhere check ((station_id is null) = (study_station_id is null));
    create index jar_standing on jar (station_id) where shelf is not null;

    create table station_move (
      id uuid primary key,
      from_station_id uuid not null references station (id),
      to_station_id uuid not null references station (id),
      reason text not null check (reason <> ''),
      moved_by uuid not null references person (id),
      moved_at timestamptz not null default app_now(),
      check (from_station_id <> to_station_id)
    );
    create index station_move_from on station_move (from_station_id);
    create index station_move_to on station_move (to_station_id);

    create table jar_move (
      id uuid primary key,
      station_move_id uuid not null references station_move (id),
      jar_id uuid not null references jar (id),
      study_station_id uuid not null references study_station (id),
      from_shelf integer not null,
      from_place integer not null,
      to_shelf integer not null,
      to_place integer not null,
      unique (station_move_id, jar_id)
    );
    create index jar_move_jar on jar_move (jar_id);
    create index jar_move_study_station on jar_move (study_station_id);

    -- Written where most of a series' jars went along: from then on its temperature is that of the new station.
    create table study_station_move (
      id uuid primary key,
      station_move_id uuid not null references station_move (id),
      study_station_id uuid not null references study_station (id),
      unique (station_move_id, study_station_id)
    );
    create index study_station_move_of on study_station_move (study_station_id);

    -- The stations whose temperature a series had, one after the other; the last has no end.
    create view study_station_stay as
      select study_station_id, station_id, from_at,
        lead(from_at) over (partition by study_station_id order by from_at) as until_at
      from (
        select ss.id as study_station_id, ss.station_id, s.started_at as from_at
          from study_station ss join study s on s.id = ss.study_id
        union all
        select ssm.study_station_id, m.to_station_id, m.moved_at
          from study_station_move ssm join station_move m on m.id = ssm.station_move_id
      ) stay;

    create table station_downtime (
      id uuid primary key,
      station_id uuid not null references station (id),
      from_on date not null,
      to_on date not null,
      reason text not null check (reason <> ''),
      planned_by uuid not null references person (id),
      planned_at timestamptz not null default app_now(),
      check (to_on >= from_on)
    );
    create index station_downtime_of on station_downtime (station_id, to_on);

    create table station_downtime_cancel (
      id uuid primary key,
      station_downtime_id uuid not null unique references station_downtime (id),
      reason text not null check (reason <> ''),
      cancelled_by uuid not null references person (id),
      cancelled_at timestamptz not null default app_now()
    );

    alter table study_amendment drop constraint study_amendment_kind_check,
      add constraint study_amendment_kind_check
        check (kind in ('time point','retain','station end','tolerance','not started'));
  `.execute(db)
  for (const table of [
    'station_move',
    'jar_move',
    'study_station_move',
    'station_downtime',
    'station_downtime_cancel',
  ]) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert'), append_only(${table})`.execute(
      db,
    )
  }
  await sql`select grant_app('study_station_stay', 'select')`.execute(db)
}
