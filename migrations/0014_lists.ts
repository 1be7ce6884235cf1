import { sql, type Kysely } from 'kysely'

// What lists are sorted by at a hundred thousand rows: codes as people order them, and the figures of a formula.
export async function up(db: Kysely<any>): Promise<void> {
  await sql`
    -- N9 before N10, capitals beside their small letters; ties fall to the bytes, so that equal means equal.
    create collation natural_order (provider = icu, locale = 'en-u-kn-true');

    -- Of each formula's latest version. Derived from its lines by lib/science when they are saved; never typed.
    create table formula_figure (
      formula_id uuid primary key references formula (id),
      formula_version_id uuid not null references formula_version (id),
      internal_volume_percent numeric,
      is_high_internal_phase boolean not null,
      missing_thousandths integer not null,
      cost_cents_per_kg integer
    );
    select trail_exempt('formula_figure', 'derived from a formula''s lines, which are on the trail themselves'),
      grant_app('formula_figure', 'select, insert, update');

    insert into formula_figure
    select formula_id, id, 100 * inside / volume, coalesce(inside / volume > 0.74, false), 100000 - coalesce(total, 0),
      case when priced > 0 then round(cost / 100000.0) end
    from (
      select distinct on (formula_id) formula_id, id from formula_version order by formula_id, number desc
    ) latest
    left join lateral (
      select sum(percent_thousandths) as total, sum(percent_thousandths / density) as volume,
        sum(case when is_internal then percent_thousandths / density else 0 end) as inside,
        count(price_cents_per_kg) as priced, sum(percent_thousandths::bigint * price_cents_per_kg) as cost
      from formula_line where formula_version_id = latest.id and percent_thousandths > 0
    ) lines on true;

    create index formula_list on formula (code collate natural_order, id);
    create index batch_list on batch (code collate natural_order, id);
    create index batch_made on batch ((coalesce(made_at, created_at)), id);
    create index ingredient_list on ingredient (inci_name collate natural_order, id);
    create index study_list on study (code collate natural_order, id);
    create index reading_list on reading (study_id, recorded_at, id) where supersedes_id is null;
    create index pull_jar_jar on pull_jar (jar_id);
    create index trail_kind on trail (table_name, id);
  `.execute(db)
}
