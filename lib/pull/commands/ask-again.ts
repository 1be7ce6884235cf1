import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'

/**
 * What is void is asked for again: a jar that was closed today is open once nothing of the attribute stands. Later there
 * is nothing left to measure in it, and the void with its reason is what is on record.
 */
export async function askAgain(trx: Trx, pullJarId: string, attribute: string): Promise<void> {
  await sql`
    with opened as (
      update pull_jar pj set state = case when pj.taken_at is null then 'due' else 'resting' end,
          version = pj.version + 1, closed_at = null, closed_by = null
        from jar, (select coalesce((select time_zone from lab limit 1), 'UTC') as zone) lab
        where pj.id = ${pullJarId} and pj.state = 'done' and jar.id = pj.jar_id and jar.state <> 'lost'
          and (pj.closed_at at time zone lab.zone)::date = (app_now() at time zone lab.zone)::date
          and not exists (select from reading r where r.pull_jar_id = pj.id and r.attribute = ${attribute}
            and not r.is_void and not exists (select from reading newer where newer.supersedes_id = r.id))
        returning pj.jar_id, case when pj.taken_at is null then 'stored' else 'resting' end as state
    )
    update jar set state = opened.state, version = jar.version + 1
      from opened where jar.id = opened.jar_id and jar.state <> opened.state
  `.execute(trx)
}
