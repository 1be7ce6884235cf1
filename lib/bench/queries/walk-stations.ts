import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'

/** Stations in walking order, also the empty ones, and when each has something to read next. */
export async function listWalk(db: Db, today: string) {
  return db
    .selectFrom('station')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('pull')
          .innerJoin('study', 'study.id', 'pull.studyId')
          .innerJoin('pullJar as pj', 'pj.pullId', 'pull.id')
          .innerJoin('jar', 'jar.id', 'pj.jarId')
          .select('pull.dueOn as nextOn')
          .select(({ fn }) => fn.countAll<number>().as('nextCount'))
          .whereRef('jar.stationId', '=', 'station.id')
          .where('study.state', '=', 'running')
          .where('pj.state', '=', 'due')
          .where('pull.dueOn', '>', today)
          .groupBy('pull.dueOn')
          .orderBy('pull.dueOn')
          .limit(1)
          .as('coming'),
      (join) => join.onTrue(),
    )
    .select([
      'station.id',
      'station.name',
      'station.kind',
      'station.temperatureC',
      'station.cycleLowC',
      'station.cycleHighC',
      'station.walkOrder',
      'station.caution',
      'coming.nextOn',
      'coming.nextCount',
    ])
    .select(
      sql<{
        fromOn: string
        toOn: string
        reason: string
      } | null>`(select jsonb_build_object('fromOn', d.from_on,
          'toOn', d.to_on, 'reason', d.reason) from station_downtime d
        where d.station_id = station.id and d.to_on >= ${today}::date and d.from_on <= ${today}::date + 7
          and not exists (select from station_downtime_cancel c where c.station_downtime_id = d.id)
        order by d.from_on limit 1)`.as('downtime'),
    )
    .where('station.isActive', '=', true)
    .orderBy('station.walkOrder')
    .orderBy('station.name')
    .execute()
}
