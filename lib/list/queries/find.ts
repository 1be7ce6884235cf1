import { sql, type SqlBool } from 'kysely'
import type { Db } from '@/lib/db/client'
import type { ListQuery } from '../schema'
import { all, sortOf, type Source } from './source'
import type { Stop } from './token'

/** What has no value stands at the end in either order, so that it is read in two parts, each along the sort column. */
export async function find<Row>(
  db: Db,
  source: Source<Row>,
  query: ListQuery,
  stop: Stop | null,
  isBack: boolean,
  limit: number,
): Promise<Stop[]> {
  const { by } = sortOf(source, query)
  const isUp = (query.order === 'asc') !== isBack
  const parts = isBack ? ['empty', 'told'] : ['told', 'empty']
  const begun = stop && stop.value === null ? parts.indexOf('empty') : stop ? parts.indexOf('told') : 0
  const found: Stop[] = []
  for (const [index, part] of parts.entries()) {
    if (index < begun || found.length >= limit) continue
    const past = stop && index === begun ? [beyond(source, query, stop, isUp)] : []
    const isPart = part === 'told' ? sql<SqlBool>`${by} is not null` : sql<SqlBool>`${by} is null`
    const order = sql.raw(isUp ? 'asc' : 'desc')
    const { rows } = await sql<Stop>`
      select ${source.id}::text as id, (${by})::text as value from ${source.from}
      where ${all([...source.where, isPart, ...past])}
      order by ${part === 'told' ? sql`${by} ${order},` : sql``} ${source.id} ${order}
      limit ${sql.lit(limit - found.length)}
    `.execute(db)
    found.push(...rows)
  }
  return found
}

export function beyond<Row>(source: Source<Row>, query: ListQuery, stop: Stop, isUp: boolean) {
  const { by, kind } = sortOf(source, query)
  const sign = sql.raw(isUp ? '>' : '<')
  const id = sql`${stop.id}::${sql.raw(source.idKind)}`
  if (stop.value === null) return sql<SqlBool>`${source.id} ${sign} ${id}`
  return sql<SqlBool>`(${by}, ${source.id}) ${sign} (${stop.value}::${sql.raw(types[kind])}, ${id})`
}

export async function hydrate<Row>(source: Source<Row>, found: Stop[]): Promise<Row[]> {
  if (found.length === 0) return []
  const rows = await source.rows(found.map((one) => one.id))
  const byId = new Map(rows.map((row) => [source.idOf(row), row]))
  return found.flatMap(({ id }) => byId.get(id) ?? [])
}

const types = { text: 'text', number: 'numeric', day: 'date', instant: 'timestamptz' } as const
