import { sql, type Kysely } from 'kysely'

/**
 * A half of a freeze-thaw cycle can be corrected or taken back: a row of its own that supersedes. What a half typed
 * late means for readings already taken is a doubt of its own. An overdue half is mailed once.
 */
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table cycle_step
      add column supersedes_id uuid unique references cycle_step (id),
      add column is_void boolean not null default false,
      add column reason text,
      add constraint cycle_step_reason check ((supersedes_id is null) = (reason is null)),
      add constraint cycle_step_void check (supersedes_id is not null or not is_void);

    alter table reading_doubt
      add column cycle_step_id uuid references cycle_step (id),
      drop constraint reading_doubt_check,
      add constraint reading_doubt_check check (num_nonnulls(calibration_id, instrument_check_id, cycle_step_id) = 1);
    drop index reading_doubt_once;
    create unique index reading_doubt_once on reading_doubt
      (reading_id, calibration_id, instrument_check_id, cycle_step_id) nulls not distinct;

    create table cycle_alarm (
      id uuid primary key,
      begin_press_id uuid not null unique references cycle_press (id),
      due_at timestamptz not null,
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now()
    );
    select add_trail('cycle_alarm'), grant_app('cycle_alarm', 'select, insert'), append_only('cycle_alarm');
  `.execute(db)
}
