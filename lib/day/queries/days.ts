import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { getLabDay } from '@/lib/bench/queries/lab-day'

export type EnteredDay = {
  day: string
  readings: number
  doubted: number
  /** Corrections and voids. */
  changed: number
  mishaps: number
  missed: number
  by: { initials: string; name: string }[]
  reviewedBy: string | null
  reviewedAt: string | null
  /** Entries that no review has seen. */
  unseen: number
}

/** The lab's days with something entered at the Bench, the newest first. */
export async function listDays(db: Db, _actor: Actor): Promise<EnteredDay[]> {
  const { zone, today } = await getLabDay(db)
  const { rows } = await sql<EnteredDay>`
    with entry as (
      select r.id, (r.measured_at at time zone ${zone})::date as day, r.recorded_by as person_id,
        (r.doubts <> '[]' or exists (select from reading_doubt d where d.reading_id = r.id)) as is_doubted, r.supersedes_id is not null as is_change, false as is_mishap, false as is_missed
      from reading r where r.pull_jar_id is not null and r.measured_at > ${today}::date - 120
      union all
      select m.id, (m.happened_at at time zone ${zone})::date, m.recorded_by, false, false, true, m.kind <> 'pulled early'
      from jar_mishap m where m.happened_at > ${today}::date - 120
    ), seen as (select distinct unnest(entry_ids) as id from day_review where day > ${today}::date - 122)
    select entry.day, (count(*) filter (where not is_mishap and not is_change))::int as readings,
      (count(*) filter (where is_doubted))::int as doubted, (count(*) filter (where is_change))::int as changed,
      (count(*) filter (where is_mishap))::int as mishaps, (count(*) filter (where is_missed))::int as missed,
      (count(*) filter (where seen.id is null))::int as unseen,
      (select jsonb_agg(jsonb_build_object('initials', p.initials, 'name', p.name) order by p.name) from person p
        where p.id = any(array_agg(entry.person_id))) as by,
      last.name as reviewed_by, last.reviewed_at
    from entry
      left join seen on seen.id = entry.id
      left join lateral (select p.name, d.reviewed_at from day_review d join person p on p.id = d.reviewed_by
        where d.day = entry.day order by d.reviewed_at desc, d.id desc limit 1) last on true
    group by entry.day, last.name, last.reviewed_at
    order by entry.day desc
    limit 90
  `.execute(db)
  return rows
}
