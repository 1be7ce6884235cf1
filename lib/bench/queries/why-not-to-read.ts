import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import { whyNotToRead, type JarAtHand } from '@/lib/jar/rules/at-hand'

/** What a code says of which nothing is asked at the Bench: which jar it is, where it belongs, and when it is due. */
export async function sayWhyNotToRead(db: Db, code: string): Promise<string> {
  const jar = await db
    .selectFrom('jar')
    .innerJoin('study', 'study.id', 'jar.studyId')
    .innerJoin('batch', 'batch.id', 'jar.batchId')
    .leftJoin('studyStation as ss', 'ss.id', 'jar.studyStationId')
    .leftJoin('station', 'station.id', 'jar.stationId')
    .select(['jar.code', 'jar.kind', 'jar.state', 'jar.shelf', 'jar.place', 'jar.setAsideFor'])
    .select(['study.code as studyCode', 'study.title as studyTitle', 'study.state as studyState'])
    .select(['batch.code as batchCode', 'station.name as stationName'])
    .select(['ss.temperatureC', 'ss.isFreezeThaw'])
    .select(
      sql<JarAtHand['mishap']>`(select jsonb_build_object('kind', m.kind,
          'on', (m.happened_at at time zone coalesce((select time_zone from lab limit 1), 'UTC'))::date)
        from jar_mishap m where m.jar_id = jar.id and m.kind in ('broken', 'lost', 'wrong jar')
        order by m.recorded_at desc limit 1)`.as('mishap'),
    )
    .select(
      sql<string | null>`(select min(pull.due_on) from pull_jar pj join pull on pull.id = pj.pull_id
        where pj.jar_id = jar.id and pj.state in ('due', 'resting'))`.as('dueOn'),
    )
    .where('jar.code', '=', code)
    .executeTakeFirst()
  if (!jar) return `No jar has the code ${code.slice(0, 20)}. Read the label again.`
  return whyNotToRead({
    ...jar,
    kind: jar.kind as JarAtHand['kind'],
    state: jar.state as JarAtHand['state'],
  })
}
