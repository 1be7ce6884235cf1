import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'

export type LoadedDay = { day: string; counts: { stationId: string; count: number }[] }

/** The next seven days on which the lab works, each with what is planned at which station. */
export async function listWeekLoad(db: Db, today: string): Promise<LoadedDay[]> {
  const { rows } = await sql<LoadedDay>`
    select work.day, (select coalesce(jsonb_agg(jsonb_build_object('stationId', due.station_id, 'count', due.count)), '[]')
        from (select jar.station_id, count(*)::int as count from pull
            join study on study.id = pull.study_id and study.state = 'running'
            join pull_jar pj on pj.pull_id = pull.id and pj.state = 'due'
            join jar on jar.id = pj.jar_id
          where pull.due_on = work.day group by jar.station_id) due) as counts
    from (select d::date as day from lab, generate_series(${today}::date + 1, ${today}::date + 40, interval '1 day') d
      where extract(isodow from d)::integer = any(lab.working_days)
        and not exists (select from holiday where holiday.day = d::date)
      order by d limit 7) work
    order by work.day
  `.execute(db)
  return rows
}
