import { sql, type Kysely } from 'kysely'

// What an outside laboratory reported of a study's jars, each with its document; such results are never changed.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    create table outside_result (
      id uuid primary key,
      study_id uuid not null references study (id),
      -- Null where the report is about all of them.
      batch_id uuid references batch (id),
      -- Null where it is about the study as a whole, 0 for the start.
      time_weeks numeric check (time_weeks between 0 and 520),
      what text not null check (what in ('microbiology','preservative efficacy','another outside test')),
      test text not null,
      outcome text not null check (outcome in ('pass','fail','not judged')),
      -- As the report says it: "under 10 CFU/g".
      value text not null default '',
      lab_name text not null,
      report_number text not null,
      reported_on date not null,
      note text not null default '',
      -- A result that takes the place of another, with the reason; both stay.
      supersedes_id uuid unique references outside_result (id),
      reason text,
      sha256 text not null,
      bytes integer not null,
      type text not null,
      original_name text not null default '',
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check ((supersedes_id is null) = (reason is null))
    );
    create index outside_result_study on outside_result (study_id);
    select add_trail('outside_result'), grant_app('outside_result', 'select, insert'), append_only('outside_result');
  `.execute(db)
}
