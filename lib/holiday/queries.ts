import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import type { LabCalendar } from '@/lib/study/rules/working-days'

/** The lab's calendar inside another statement, so that a command that needs it asks nothing more. */
export const calendarOfLab = sql<LabCalendar>`(
  select jsonb_build_object(
    'timeZone', coalesce(max(lab.time_zone), 'UTC'),
    'workingDays', coalesce(to_jsonb(max(lab.working_days)), '[1,2,3,4,5,6,7]'),
    'holidays', coalesce((select jsonb_agg(jsonb_build_object('day', h.day, 'name', h.name) order by h.day)
      from holiday h), '[]')
  ) from lab)`

/** The calendar, and which day it is in the lab. */
export async function getCalendar(db: Db | Trx): Promise<LabCalendar & { today: string }> {
  const { rows } = await sql<{ calendar: LabCalendar; today: string }>`
    select ${calendarOfLab} as calendar,
      (app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date as today
  `.execute(db)
  const { calendar, today } = rows[0]!
  return { ...calendar, today }
}

/** Holidays from the given day on, and how many lie behind it. */
export async function listHolidays(db: Db) {
  return db
    .selectFrom('holiday')
    .innerJoin('person', 'person.id', 'holiday.addedBy')
    .select(['holiday.id', 'holiday.day', 'holiday.name', 'person.initials as addedBy'])
    .orderBy('holiday.day')
    .execute()
}
export type HolidayRow = Awaited<ReturnType<typeof listHolidays>>[number]
