import { sql, type SqlBool } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { ListQuery } from '../schema'
import { beyond, find, hydrate } from './find'
import { all, sortOf, type Source } from './source'
import { readToken, writeToken, type Stop } from './token'

export const pageSize = 50

export type ListPage<Row> = {
  rows: Row[]
  /** Of all pages, and how many rows stand before this one; null where it is not counted. */
  total: number | null
  before: number | null
  previous: string | null
  next: string | null
}

/** One page keyed by (sort column, id): as quick at the end as at the beginning, and unmoved by rows that come in between. */
export async function pageOf<Row>(db: Db, source: Source<Row>, query: ListQuery): Promise<ListPage<Row>> {
  const stop = readToken(source, query)
  const isBack = query.place?.side === 'before'
  let found = await find(db, source, query, stop, isBack, pageSize + 1)
  // Going back has reached the beginning: the first page is shown whole.
  const isFirst = stop === null || (isBack && found.length <= pageSize)
  if (stop && isBack && isFirst) found = await find(db, source, query, null, false, pageSize + 1)
  const goesOn = found.length > pageSize
  const shown = found.slice(0, pageSize)
  if (isBack && !isFirst) shown.reverse()
  const [first, last] = [shown[0], shown.at(-1)]
  const counts = source.isUncounted ? null : await count(db, source, query, isFirst ? undefined : first)
  const hasNext = isBack && !isFirst ? true : goesOn
  return {
    rows: await hydrate(source, shown),
    total: counts?.total ?? null,
    before: counts?.before ?? null,
    previous: isFirst || !first ? null : writeToken(first),
    next: hasNext && last ? writeToken(last) : null,
  }
}

async function count<Row>(db: Db, source: Source<Row>, query: ListQuery, first: Stop | undefined) {
  const { by } = sortOf(source, query)
  const isUp = query.order === 'asc'
  const isBefore =
    first === undefined
      ? sql<SqlBool>`false`
      : first.value === null
        ? sql<SqlBool>`(${by} is not null or ${beyond(source, query, first, !isUp)})`
        : beyond(source, query, first, !isUp)
  const { rows } = await sql<{ total: number; before: number }>`
    select count(*) as total, count(*) filter (where ${isBefore}) as before
    from ${source.from} where ${all(source.where)}
  `.execute(db)
  return rows[0]!
}
