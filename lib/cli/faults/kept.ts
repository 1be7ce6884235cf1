import { sql } from 'kysely'
import type { TestDatabase } from '@/tests/support/database'
import { atMost, type Figure } from '../bench/figure'

const times = (count: number) => String(count)

/** What the database holds of acknowledged saves, each given as the ids of its readings. */
export async function countKept({ owner }: TestDatabase, saves: readonly string[][]): Promise<Figure[]> {
  const ids = saves.flat()
  const count = async (query: ReturnType<typeof sql<{ count: number }>>) =>
    Number((await query.execute(owner)).rows[0]!.count)
  const standing = await count(sql`select count(*) from reading where id = any(${ids}::uuid[])`)
  const inAll = await count(sql`select count(*) from reading where pull_jar_id is not null`)
  const doubled = await count(sql`select count(*) from (
    select pull_jar_id, attribute, replicate from reading where pull_jar_id is not null
      group by 1, 2, 3 having count(*) > 1) as twice`)
  const withoutTrail = await count(sql`select count(*) from reading
    where (select count(*) from trail where table_name = 'reading' and row_id = reading.id::text) <> 1`)
  const halfClosed = await count(sql`select count(*) from pull_jar as pj
    where (pj.state = 'done') <> exists (select from reading where pull_jar_id = pj.id)`)
  const notComputed = await count(sql`select count(*) from (
    select distinct study_id, batch_id, study_station_id, attribute from reading where pull_jar_id is not null) as r
    where not exists (select from series s where s.study_id = r.study_id and s.batch_id = r.batch_id
      and s.study_station_id = r.study_station_id and s.attribute = r.attribute)`)
  const sent = new Set(ids).size
  return [
    atMost('readings acknowledged and missing', sent - standing, 0, times),
    atMost('readings nobody was told of', inAll - standing, 0, times),
    atMost('readings that stand twice', doubled, 0, times),
    atMost('readings without exactly one entry in the trail', withoutTrail, 0, times),
    atMost('jars done without a reading, or read and not done', halfClosed, 0, times),
    atMost('readings whose series was not computed', notComputed, 0, times),
  ]
}
