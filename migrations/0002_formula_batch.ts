import { sql, type Kysely } from 'kysely'

// Percentages are whole thousandths of a percent and money whole cents, so that sums are exact.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    create table ingredient (
      id uuid primary key,
      inci_name text not null,
      function text not null default '',
      density numeric not null check (density > 0),
      density_source text not null default 'from memory',
      is_oil_phase boolean not null default false,
      price_cents_per_kg integer check (price_cents_per_kg >= 0),
      caution text not null default '',
      version integer not null default 1,
      created_at timestamptz not null default app_now()
    );
    create unique index ingredient_inci_name on ingredient (lower(inci_name));

    create table formula (
      id uuid primary key,
      code text not null unique,
      name text not null,
      emulsion_type text not null check (emulsion_type in ('water-in-oil','water-in-silicone','oil-in-water')),
      client_id uuid references client (id),
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now()
    );

    create table formula_version (
      id uuid primary key,
      formula_id uuid not null references formula (id),
      number integer not null,
      state text not null default 'draft' check (state in ('draft','locked')),
      note text not null default '',
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now(),
      unique (formula_id, number)
    );

    create table formula_line (
      id uuid primary key,
      formula_version_id uuid not null references formula_version (id),
      position integer not null,
      phase text not null,
      ingredient_id uuid references ingredient (id),
      inci_name text not null,
      function text not null default '',
      percent_thousandths integer not null check (percent_thousandths >= 0),
      density numeric not null check (density > 0),
      is_internal boolean not null,
      -- The one line that makes up what is missing to 100 %.
      is_remainder boolean not null default false,
      price_cents_per_kg integer check (price_cents_per_kg >= 0)
    );
    create unique index formula_line_remainder on formula_line (formula_version_id) where is_remainder;
    create index formula_line_version on formula_line (formula_version_id, position);

    create table formula_step (
      id uuid primary key,
      formula_version_id uuid not null references formula_version (id),
      position integer not null,
      phase text not null default '',
      instruction text not null,
      speed_rpm integer,
      minutes numeric,
      temperature_c numeric,
      caution text not null default ''
    );
    create index formula_step_version on formula_step (formula_version_id, position);

    create table batch (
      id uuid primary key,
      code text not null unique,
      formula_version_id uuid not null references formula_version (id),
      size_g numeric not null check (size_g > 0),
      state text not null default 'making' check (state in ('making','resting','released','rejected')),
      -- When making ended; the rest before the emulsion-type test counts from here.
      made_at timestamptz,
      yield_g numeric check (yield_g >= 0),
      fill_g numeric check (fill_g > 0),
      closure text not null default '',
      emulsion_type_method text check (emulsion_type_method in ('dilution','conductivity','dye')),
      emulsion_type_found text check (emulsion_type_found in ('water-in-oil','water-in-silicone','oil-in-water','not clear')),
      emulsion_type_reason text,
      conductivity_us_cm numeric check (conductivity_us_cm >= 0),
      tested_by uuid references person (id),
      tested_at timestamptz,
      decision_reason text,
      decided_by uuid references person (id),
      decided_at timestamptz,
      note text not null default '',
      version integer not null default 1,
      created_by uuid not null references person (id),
      created_at timestamptz not null default app_now()
    );
    create index batch_formula_version on batch (formula_version_id);

    create table batch_weighing (
      id uuid primary key,
      batch_id uuid not null references batch (id),
      formula_line_id uuid not null references formula_line (id),
      position integer not null,
      target_g numeric not null,
      actual_g numeric check (actual_g >= 0),
      actual_typed text,
      lot text not null default '',
      balance text not null default '',
      note text not null default '',
      version integer not null default 1,
      weighed_by uuid references person (id),
      weighed_at timestamptz,
      unique (batch_id, formula_line_id)
    );

    create table batch_step (
      id uuid primary key,
      batch_id uuid not null references batch (id),
      formula_step_id uuid not null references formula_step (id),
      position integer not null,
      actual_speed_rpm integer,
      actual_minutes numeric,
      actual_temperature_c numeric,
      note text not null default '',
      version integer not null default 1,
      done_by uuid references person (id),
      done_at timestamptz,
      unique (batch_id, formula_step_id)
    );
  `.execute(db)
  for (const table of [
    'ingredient',
    'formula',
    'formula_version',
    'formula_line',
    'formula_step',
    'batch',
    'batch_weighing',
    'batch_step',
  ]) {
    await sql`select add_trail(${table}), grant_app(${table}, 'select, insert, update')`.execute(db)
  }
  // A draft's lines and steps are replaced as a whole; the trail keeps what stood before.
  await sql`select grant_app('formula_line', 'delete'), grant_app('formula_step', 'delete')`.execute(db)
}
