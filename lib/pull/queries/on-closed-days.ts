import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { getCalendar } from '@/lib/holiday/queries'
import { proposeMoves, type PullOnClosedDay } from '../rules/propose-moves'

/**
 * Pulls of running studies, not yet begun, that stand on a day on which the lab does not work, each with the day to
 * which it could move inside its window.
 */
export async function listPullsOnClosedDays(db: Db | Trx) {
  const { today, ...calendar } = await getCalendar(db)
  const { rows } = await sql<PullOnClosedDay>`
    select p.id as "pullId", s.code as "studyCode", s.started_on as "startedOn", p.study_station_id as "studyStationId",
      p.label, p.time_weeks as "timeWeeks", p.due_on as "dueOn", p.window_from as "windowFrom", p.window_to as "windowTo",
      st.name as "stationName", ss.temperature_c as "temperatureC", ss.is_freeze_thaw as "isFreezeThaw", ss.variant,
      coalesce((select jsonb_agg(other.due_on) from pull other
        where other.study_station_id = p.study_station_id and other.id <> p.id
          and other.due_on between p.window_from and p.window_to), '[]') as taken
    from pull p
      join study s on s.id = p.study_id and s.state = 'running'
      join study_station ss on ss.id = p.study_station_id and ss.ended_on is null
      join station st on st.id = ss.station_id
      cross join lab
    where p.due_on >= ${today}
      and (not extract(isodow from p.due_on)::integer = any(lab.working_days)
        or exists (select from holiday where holiday.day = p.due_on))
      and exists (select from pull_jar pj where pj.pull_id = p.id)
      and not exists (select from pull_jar pj where pj.pull_id = p.id
        and (pj.state <> 'due' or pj.taken_at is not null or pj.opened_at is not null))
    order by p.due_on, s.code, ss.position
    limit 2000
  `.execute(db)
  return proposeMoves(rows, calendar, today)
}
export type ClosedDayPull = Awaited<ReturnType<typeof listPullsOnClosedDays>>[number]
