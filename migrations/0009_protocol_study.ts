import { sql, type Kysely } from 'kysely'

export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table protocol_version
      drop constraint protocol_version_state_check,
      add column approved_by uuid references person (id),
      add column approved_at timestamptz,
      add constraint protocol_version_state_check check (state in ('draft','locked','approved')),
      add constraint protocol_version_approval check
        ((state = 'approved') = (approved_at is not null) and (approved_at is null) = (approved_by is null));

    -- As it stood on the day of the start; null where that was before protocols were approved here.
    alter table study add column protocol_approval text check (protocol_approval in ('approved','not approved'));

    -- One station of the lab may keep upright jars beside lying ones: two stations of the study.
    alter table study_station
      drop constraint study_station_study_id_station_id_key,
      add column variant text not null default '',
      add column ended_on date,
      add constraint study_station_place unique (study_id, station_id, variant);

    alter table jar add column set_aside_for text;

    create table study_amendment (
      id uuid primary key,
      study_id uuid not null references study (id),
      number integer not null check (number > 0),
      kind text not null check (kind in ('time point','retain','station end','tolerance')),
      study_station_id uuid references study_station (id),
      sentence text not null,
      before jsonb not null default '{}',
      after jsonb not null default '{}',
      reason text not null check (reason <> ''),
      made_by uuid not null references person (id),
      made_at timestamptz not null default app_now(),
      unique (study_id, number)
    );

    select add_trail('study_amendment'), grant_app('study_amendment', 'select, insert'),
      append_only('study_amendment');
  `.execute(db)
}
