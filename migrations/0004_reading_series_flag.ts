import { sql, type Kysely } from 'kysely'

export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    -- Append-only. A correction is a new row that names the row it supersedes; a void is a correction
    -- without a value. The initial of a batch has no station and no pull.
    create table reading (
      id uuid primary key,
      study_id uuid not null references study (id),
      batch_id uuid not null references batch (id),
      study_station_id uuid references study_station (id),
      pull_jar_id uuid references pull_jar (id),
      jar_id uuid references jar (id),
      attribute text not null,
      replicate integer not null default 1 check (replicate > 0),
      value numeric,
      word text,
      typed text not null,
      detail jsonb not null default '{}',
      instrument_id uuid references instrument (id),
      doubts jsonb not null default '[]',
      is_void boolean not null default false,
      supersedes_id uuid unique references reading (id),
      reason text,
      measured_at timestamptz not null,
      claimed_at timestamptz,
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (measured_at <= recorded_at),
      check (is_void or value is not null or word is not null),
      check (supersedes_id is null or length(btrim(coalesce(reason, ''))) > 0)
    );
    create index reading_study on reading (study_id, attribute);
    create index reading_pull_jar on reading (pull_jar_id);

    create table photo (
      id uuid primary key,
      study_id uuid not null references study (id),
      jar_id uuid not null references jar (id),
      pull_jar_id uuid references pull_jar (id),
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      bytes integer not null,
      type text not null,
      width integer not null,
      height integer not null,
      original_name text not null default '',
      taken_by uuid not null references person (id),
      taken_at timestamptz not null,
      recorded_at timestamptz not null default app_now()
    );
    create index photo_study on photo (study_id);

    -- Derived from readings by lib/science in the saving transaction; never typed.
    create table series (
      id uuid primary key,
      study_id uuid not null references study (id),
      batch_id uuid not null references batch (id),
      study_station_id uuid not null references study_station (id),
      attribute text not null,
      standing text not null check (standing in ('steady','leaning','out','untold')),
      used numeric,
      out_since_weeks numeric,
      leaves_at_weeks numeric,
      latest_value numeric,
      latest_weeks numeric,
      finding jsonb not null,
      computed_at timestamptz not null default app_now(),
      unique (study_id, batch_id, study_station_id, attribute)
    );

    create table flag (
      id uuid primary key,
      number integer generated always as identity unique,
      study_id uuid not null references study (id),
      batch_id uuid not null references batch (id),
      study_station_id uuid references study_station (id),
      attribute text not null,
      rule text not null,
      level text not null check (level in ('out','leaning','flag','doubt')),
      reading_id uuid references reading (id),
      at_weeks numeric,
      sentence text not null,
      evidence jsonb not null,
      state text not null default 'open' check (state in ('open','answered','closed')),
      raised_at timestamptz not null default app_now(),
      raised_by uuid not null references person (id),
      cause text,
      action text,
      why text,
      answered_by uuid references person (id),
      answered_at timestamptz,
      closed_by uuid references person (id),
      closed_at timestamptz,
      closing_note text,
      -- 'doubt': the doubt is set aside, the reading counts. 'reading': QA named a laboratory cause, it never counts.
      settles text check (settles in ('doubt','reading')),
      -- Of a doubt on an instrument's whole day.
      instrument_id uuid references instrument (id),
      on_day date,
      version integer not null default 1
    );
    create index flag_study on flag (study_id, state);
    create unique index flag_once on flag
      (study_id, batch_id, study_station_id, attribute, rule, level, reading_id, instrument_id, on_day)
      nulls not distinct where state = 'open';

    create table flag_comment (
      id uuid primary key,
      flag_id uuid not null references flag (id),
      text text not null check (length(btrim(text)) > 0),
      written_by uuid not null references person (id),
      written_at timestamptz not null default app_now()
    );
    create index flag_comment_flag on flag_comment (flag_id);
  `.execute(db)
  const appendOnly = ['reading', 'photo', 'flag_comment']
  for (const table of [...appendOnly, 'flag']) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert')`.execute(db)
    if (appendOnly.includes(table)) await sql`select append_only(${table})`.execute(db)
  }
  await sql`
    select grant_app('flag', 'update'), grant_app('series', 'select, insert, update, delete'),
      trail_exempt('series', 'derived from readings; recomputed in the transaction that saves them')
  `.execute(db)
}
