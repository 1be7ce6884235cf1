import { sql, type RawBuilder, type SqlBool } from 'kysely'
import type { ListQuery, ValueKind } from '../schema'

/** Where a list's rows come from; the actor's scope is among `where`, for pages, counts and files alike. */
export type Source<Row> = {
  /** The tables that search, filters and sorting need, and no other. */
  from: RawBuilder<unknown>
  where: RawBuilder<SqlBool>[]
  /** What tells rows apart where the sort column does not. */
  id: RawBuilder<unknown>
  idKind: 'uuid' | 'bigint'
  sorts: Record<string, { by: RawBuilder<unknown>; kind: ValueKind }>
  /** The rows of these ids with all that is shown of them, in any order. */
  rows: (ids: string[]) => Promise<Row[]>
  idOf: (row: Row) => string
  /** How many rows a file takes at a time, where one row carries much with it. */
  atOnce?: number
  /** Counting would read a table that only grows. */
  isUncounted?: true
}

export function sortOf<Row>(source: Source<Row>, { sort }: ListQuery) {
  const found = source.sorts[sort]
  if (!found) throw new Error(`the list says that it sorts by ${sort}, its source does not`)
  return found
}

/** "100 % oil" looks for what it says: % and _ of a typed text are no wildcards. */
export function likeTyped(q: string): string {
  return `%${q.replace(/[\\%_]/g, '\\$&')}%`
}

/** Codes and names as people order them: N9 before N10, capitals beside their small letters. */
export function naturally(column: string): { by: RawBuilder<unknown>; kind: ValueKind } {
  return { by: sql`${sql.ref(column)} collate natural_order`, kind: 'text' }
}

/** From and to, as days of the lab's own calendar. */
export function onDays(instant: RawBuilder<unknown>, from: string, to: string): RawBuilder<SqlBool>[] {
  const begin = (day: string) =>
    sql`(${day}::date::timestamp at time zone coalesce((select time_zone from lab), 'UTC'))`
  return [
    ...(from ? [sql<SqlBool>`${instant} >= ${begin(from)}`] : []),
    ...(to
      ? [
          sql<SqlBool>`${instant} < ((${to}::date + 1)::timestamp at time zone coalesce((select time_zone from lab), 'UTC'))`,
        ]
      : []),
  ]
}

export function all(where: RawBuilder<SqlBool>[]): RawBuilder<SqlBool> {
  return where.length > 0 ? sql.join(where, sql` and `) : sql`true`
}
