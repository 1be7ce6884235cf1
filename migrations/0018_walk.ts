import { sql, type Kysely } from 'kysely'

// What happens in a pull besides readings: mishaps and the jars that take their place, what one shift tells the next,
// and who reviewed a day's entries.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table pull_jar
      -- What the protocol asks for and was knowingly not read.
      add column left_out text[] not null default '{}',
      -- The jar of the same pull whose place this one takes.
      add column stands_in_for uuid references pull_jar (id);
    create index pull_jar_stands_in on pull_jar (stands_in_for) where stands_in_for is not null;

    create table jar_mishap (
      id uuid primary key,
      study_id uuid not null references study (id),
      jar_id uuid not null references jar (id),
      -- The pull it concerns; null where nothing was asked of the jar.
      pull_jar_id uuid references pull_jar (id),
      kind text not null check (kind in ('missed','broken','lost','wrong jar','pulled early')),
      reason text not null check (btrim(reason) <> ''),
      happened_at timestamptz not null,
      claimed_at timestamptz not null,
      recorded_by uuid not null references person (id),
      recorded_at timestamptz not null default app_now(),
      check (happened_at <= recorded_at),
      check (kind not in ('missed','pulled early') or pull_jar_id is not null)
    );
    create index jar_mishap_jar on jar_mishap (jar_id);
    create index jar_mishap_study on jar_mishap (study_id);

    create table handover_note (
      id uuid primary key,
      text text not null check (btrim(text) <> ''),
      claimed_at timestamptz not null,
      written_by uuid not null references person (id),
      written_at timestamptz not null default app_now()
    );
    create table handover_read (
      id uuid primary key,
      handover_note_id uuid not null unique references handover_note (id),
      read_by uuid not null references person (id),
      read_at timestamptz not null default app_now()
    );

    -- The readings and mishaps that were seen stand in it by id: what came later is not reviewed.
    create table day_review (
      id uuid primary key,
      day date not null,
      remark text not null default '',
      entry_ids uuid[] not null check (cardinality(entry_ids) > 0),
      reviewed_by uuid not null references person (id),
      reviewed_at timestamptz not null default app_now()
    );
    create index day_review_day on day_review (day);
  `.execute(db)
  for (const table of ['jar_mishap', 'handover_note', 'handover_read', 'day_review']) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert'), append_only(${table})`.execute(
      db,
    )
  }
}
