import { sql } from 'kysely'
import { systemActor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'

/** Ids in each table of a study; those of the copies are made of the original's and the copy's number. */
const copied: Record<string, string[]> = {
  study: ['id'],
  study_batch: ['id', 'study_id'],
  study_station: ['id', 'study_id'],
  jar: ['id', 'study_id', 'study_station_id'],
  pull: ['id', 'study_id', 'study_station_id'],
  pull_jar: ['id', 'study_id', 'pull_id', 'jar_id'],
  reading: ['id', 'study_id', 'study_station_id', 'pull_jar_id', 'jar_id'],
  series: ['id', 'study_id', 'study_station_id'],
}

/**
 * A lab that has been at it for years: so many copies of a study, made by PostgreSQL as the owner of the tables and
 * without a trail. Their pulls lie ahead, as most do on any day.
 */
export async function copyStudy(owner: Db, studyId: string, times: number): Promise<void> {
  await owner.transaction().execute(async (trx) => {
    await sql`select set_config('app.actor_id', ${systemActor().personId}, true)`.execute(trx)
    for (const [table, ids] of Object.entries(copied)) {
      const changes = ids.map((column) => sql`${sql.lit(column)}, md5(t.${sql.ref(column)}::text || i)::uuid`)
      if (table === 'study' || table === 'jar') changes.push(sql`'code', t.code || '-' || i`)
      if (table === 'pull')
        for (const day of ['due_on', 'window_from', 'window_to'])
          changes.push(sql`${sql.lit(day)}, t.${sql.ref(day)} + 1000 + i % 300`)
      const own = table === 'study' ? sql`t.id` : sql`t.study_id`
      await sql`alter table ${sql.table(table)} disable trigger user`.execute(trx)
      await sql`insert into ${sql.table(table)}
        select (jsonb_populate_record(t, jsonb_build_object(${sql.join(changes)}))).*
          from ${sql.table(table)} as t, generate_series(1, ${sql.lit(times)}) as i
          where ${own} = ${studyId} order by i`.execute(trx)
      await sql`alter table ${sql.table(table)} enable trigger user`.execute(trx)
    }
  })
  await sql`analyze`.execute(owner)
}
