import { sql, type Kysely } from 'kysely'

// What the ingredient book knows of an ingredient, and how a question to a formula was answered.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    alter table ingredient
      add column synonyms text[] not null default '{}',
      add column supplier_name text not null default '',
      -- Usual share in a formula; whole thousandths of a percent, as the lines have it.
      add column percent_low_thousandths integer check (percent_low_thousandths between 0 and 100000),
      add column percent_high_thousandths integer check (percent_high_thousandths between 0 and 100000),
      add column range_source text not null default 'from memory',
      -- mg KOH per g: what an acid takes up, and what a neutraliser gives.
      add column acid_value numeric check (acid_value >= 0),
      add column base_value numeric check (base_value >= 0),
      -- Of a preservative: the pH in which it works.
      add column ph_low numeric check (ph_low between 0 and 14),
      add column ph_high numeric check (ph_high between 0 and 14),
      -- What has to be melted before it mixes.
      add column melts_above_c numeric check (melts_above_c between -50 and 300),
      -- Of an emulsifier: the internal phase it is known to hold, % v/v.
      add column holds_internal_percent numeric check (holds_internal_percent > 0 and holds_internal_percent <= 100),
      add column figures_source text not null default 'from memory',
      add column note text not null default '',
      add check (percent_low_thousandths <= percent_high_thousandths),
      add check (ph_low <= ph_high);
    create index formula_line_ingredient on formula_line (ingredient_id);

    create table formula_answer (
      id uuid primary key,
      formula_version_id uuid not null references formula_version (id),
      question text not null,
      kind text not null check (kind in ('answered', 'set aside')),
      note text not null check (note <> ''),
      -- The number that the question asks for, such as the target pH.
      value numeric,
      -- The lines, steps and figures it rests on: where these differ now, the question is open again.
      asked_about text not null,
      answered_by uuid not null references person (id),
      answered_at timestamptz not null default app_now()
    );
    create index formula_answer_version on formula_answer (formula_version_id, question, answered_at);

    select add_trail('formula_answer'), grant_app('formula_answer', 'select, insert'), append_only('formula_answer');
  `.execute(db)
}
