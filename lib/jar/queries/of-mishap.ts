import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'

export type JarOfMishap = NonNullable<Awaited<ReturnType<typeof findJarOfMishap>>>
export type AskedOfJar = {
  id: string
  version: number
  state: string
  label: string
  windowFrom: string
  closedAt: string | null
  isRead: boolean
}

/** A jar with everything that is asked of it, and the entry of that id where it was kept before. */
export async function findJarOfMishap(db: Db | Trx, code: string, mishapId: string) {
  return db
    .selectFrom('jar')
    .innerJoin('study', 'study.id', 'jar.studyId')
    .select(['jar.id', 'jar.code', 'jar.kind', 'jar.state', 'jar.studyId'])
    .select(['study.code as studyCode', 'study.state as studyState'])
    .select([
      sql<string>`app_now()`.as('now'),
      sql<string>`(app_now() at time zone coalesce((select time_zone from lab limit 1), 'UTC'))::date`.as(
        'today',
      ),
      sql<AskedOfJar[]>`(select coalesce(jsonb_agg(jsonb_build_object('id', pj.id, 'version', pj.version,
          'state', pj.state, 'label', pull.label, 'windowFrom', pull.window_from, 'closedAt', pj.closed_at,
          'isRead', exists (select from reading r where r.pull_jar_id = pj.id and not r.is_void
            and not exists (select from reading newer where newer.supersedes_id = r.id))) order by pull.due_on), '[]')
        from pull_jar pj join pull on pull.id = pj.pull_id where pj.jar_id = jar.id)`.as('asked'),
      sql<{ id: string; jarId: string; pullJarId: string | null; recordedBy: string } | null>`(
        select jsonb_build_object('id', m.id, 'jarId', m.jar_id, 'pullJarId', m.pull_jar_id, 'recordedBy', m.recorded_by)
        from jar_mishap m where m.id = ${mishapId})`.as('before'),
    ])
    .where('jar.code', '=', code)
    .executeTakeFirst()
}
