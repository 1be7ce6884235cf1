import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'

export type TouchedPull = {
  studyCode: string
  label: string
  dueOn: string
  windowFrom: string
  windowTo: string
  jars: number
}
export type Downtime = {
  id: string
  fromOn: string
  toOn: string
  reason: string
  plannedBy: string
  plannedAt: string
  cancelledAt: string | null
  cancelledBy: string | null
  cancelReason: string | null
}

/** When a station is out of use, from today on, with those that were cancelled; the soonest first. */
export async function listDowntimes(db: Db | Trx, stationId: string, today: string): Promise<Downtime[]> {
  return db
    .selectFrom('stationDowntime as d')
    .innerJoin('person as planner', 'planner.id', 'd.plannedBy')
    .leftJoin('stationDowntimeCancel as c', 'c.stationDowntimeId', 'd.id')
    .leftJoin('person as canceller', 'canceller.id', 'c.cancelledBy')
    .select(['d.id', 'd.fromOn', 'd.toOn', 'd.reason', 'd.plannedAt', 'planner.name as plannedBy'])
    .select(['c.cancelledAt', 'canceller.name as cancelledBy', 'c.reason as cancelReason'])
    .where('d.stationId', '=', stationId)
    .where('d.toOn', '>=', today)
    .orderBy('d.fromOn')
    .execute()
}

/** Those that still hold, of every station: what the start of a study looks at. */
export async function listComingDowntimes(db: Db, today: string) {
  return db
    .selectFrom('stationDowntime as d')
    .leftJoin('stationDowntimeCancel as c', 'c.stationDowntimeId', 'd.id')
    .select(['d.stationId', 'd.fromOn', 'd.toOn', 'd.reason'])
    .where('c.id', 'is', null)
    .where('d.toOn', '>=', today)
    .orderBy('d.fromOn')
    .execute()
}

/** Pulls to come of jars that stand at a station, with how many of them each asks for. */
export async function listComingPulls(db: Db | Trx, stationId: string): Promise<TouchedPull[]> {
  const { rows } = await sql<TouchedPull>`
    select study.code as "studyCode", pull.label, pull.due_on as "dueOn", pull.window_from as "windowFrom",
      pull.window_to as "windowTo", count(*)::integer as jars
    from pull_jar pj join pull on pull.id = pj.pull_id
      join jar on jar.id = pj.jar_id
      join study on study.id = pj.study_id
    where jar.station_id = ${stationId} and jar.shelf is not null and pj.state = 'due' and study.state = 'running'
    group by study.code, pull.id, pull.label, pull.due_on, pull.window_from, pull.window_to
    order by pull.due_on, study.code
  `.execute(db)
  return rows
}
