import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'

type Called = { id: string; repeatOf: string | null }

/** Codes of the spare jars that are at rest again. What was read, opened by a photo or given up stays. */
export async function takeRepeatsBack(
  trx: Trx,
  jar: Called,
  attributes: readonly string[],
): Promise<string[]> {
  const { rows } = await sql<{ code: string }>`
    with gone as (
      delete from pull_jar pj where pj.repeat_of = ${jar.repeatOf ?? jar.id} and pj.id <> ${jar.id}
        and pj.attribute = any(${attributes as string[]}) and pj.state in ('due', 'resting')
        and not exists (select from reading r where r.pull_jar_id = pj.id)
        and not exists (select from photo p where p.pull_jar_id = pj.id)
        and not exists (select from jar_mishap m where m.pull_jar_id = pj.id)
      returning pj.jar_id
    ), moved as (
      update jar set state = 'stored', version = version + 1
        where id in (select jar_id from gone) and state = 'resting'
    )
    select jar.code from jar where jar.id in (select jar_id from gone) order by jar.code
  `.execute(trx)
  return rows.map((row) => row.code)
}

/** After a change: a spare that no open doubt of its jars calls for any more is asked for in vain. */
export async function takeUnwantedBack(trx: Trx, pullJarId: string, attribute: string): Promise<string[]> {
  const jar = await trx
    .selectFrom('pullJar as pj')
    .select(['pj.id', 'pj.repeatOf'])
    .select(
      sql<boolean>`exists (select from flag join reading r on r.id = flag.reading_id
          join pull_jar read on read.id = r.pull_jar_id
        where flag.study_id = pj.study_id and flag.attribute = ${attribute} and flag.level = 'doubt'
          and flag.state <> 'closed'
          and coalesce(read.repeat_of, read.id) = coalesce(pj.repeat_of, pj.id))`.as('isDoubted'),
    )
    .where('pj.id', '=', pullJarId)
    .executeTakeFirstOrThrow()
  return jar.isDoubted ? [] : takeRepeatsBack(trx, jar, [attribute])
}
