import { sql, type Kysely } from 'kysely'

/**
 * A half that was begun wrong is corrected or taken back as an ended one is: by a row that supersedes. A half carries why it
 * was held, also where it was typed later from paper.
 */
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table cycle_step add column held_reason text not null default '';

    alter table cycle_press
      -- A half begun anew after it was taken back supersedes what took it back, so that it is begun once at a time.
      add column supersedes_id uuid unique references cycle_press (id),
      add column is_void boolean not null default false,
      add column correction_reason text,
      add constraint cycle_press_void
        check (not is_void or (supersedes_id is not null and correction_reason is not null)),
      add constraint cycle_press_correction check (correction_reason is null or supersedes_id is not null);
    drop index cycle_press_begin;
    create unique index cycle_press_begin on cycle_press (study_station_id, cycle, half)
      where press = 'begin' and supersedes_id is null;
  `.execute(db)
}
