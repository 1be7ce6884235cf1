import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { ListQuery } from '../schema'
import { find, hydrate } from './find'
import { all, type Source } from './source'
import type { Stop } from './token'

/** Every row of every page, some at a time, for a file. */
export async function* everyRow<Row>(db: Db, source: Source<Row>, query: ListQuery) {
  const atOnce = source.atOnce ?? 1000
  let stop: Stop | null = null
  for (;;) {
    const found: Stop[] = await find(db, source, query, stop, false, atOnce)
    yield* await hydrate(source, found)
    const last = found.at(-1)
    if (!last || found.length < atOnce) return
    stop = last
  }
}

/** How many rows there are, counted no further than `most` + 1. */
export async function countUpTo<Row>(db: Db, source: Source<Row>, most: number): Promise<number> {
  const { rows } = await sql<{ count: number }>`
    select count(*) as count from (
      select 1 from ${source.from} where ${all(source.where)} limit ${sql.lit(most + 1)}) as found
  `.execute(db)
  return rows[0]!.count
}
