import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { getCalendar } from '@/lib/holiday/queries'
import type { DueJars } from '@/lib/study/rules/workload'

/** What running studies still ask of the lab, by day: three statements, however many studies run. */
export async function getWorkload(db: Db, _actor: Actor) {
  const { today, ...calendar } = await getCalendar(db)
  return { today, calendar, due: await listDueJars(db, today), late: await listLate(db, today) }
}
export type LabWorkload = Awaited<ReturnType<typeof getWorkload>>

/** A jar that rests was pulled in time, so it is work of today and not late. */
async function listDueJars(db: Db, today: string): Promise<DueJars[]> {
  const { rows } = await sql<DueJars>`
    select case when pj.state = 'resting' then greatest(p.due_on, ${today}::date) else p.due_on end as day,
      st.kind, case when pj.asks = 'watch' then 'watch' else 'measuring' end as asks, count(*)::integer as jars
    from pull_jar pj
      join pull p on p.id = pj.pull_id
      join study s on s.id = pj.study_id and s.state = 'running'
      join study_station ss on ss.id = p.study_station_id
      join station st on st.id = ss.station_id
    where pj.state in ('due', 'resting')
    group by 1, 2, 3 order by 1, 2, 3
  `.execute(db)
  return rows
}

async function listLate(db: Db, today: string) {
  return db
    .selectFrom('pullJar')
    .innerJoin('pull', 'pull.id', 'pullJar.pullId')
    .innerJoin('study', 'study.id', 'pullJar.studyId')
    .select(['study.code', 'study.title'])
    .select((eb) => [
      eb.fn.countAll<number>().as('jars'),
      eb.fn.min('pull.dueOn').as('since'),
      sql<number>`(count(*) filter (where pull.window_to < ${today}))::integer`.as('beyondWindow'),
    ])
    .where('study.state', '=', 'running')
    .where('pullJar.state', '=', 'due')
    .where('pull.dueOn', '<', today)
    .groupBy(['study.id', 'study.code', 'study.title'])
    .orderBy('since')
    .orderBy('study.code')
    .execute()
}
