import { calendarDay } from '@/lib/time/schema'
import * as z from '@/lib/http/zod'

/** How a column's values are compared and written: as text, number, day, or instant. */
export type ValueKind = 'text' | 'number' | 'day' | 'instant'

export type Column<Line> = {
  key: string
  title: string
  /** What it holds, for a file; text where nothing is said. */
  kind?: ValueKind
  /** How the database compares it; a column without cannot be sorted by. */
  sort?: ValueKind
  /** Not among the columns shown until somebody chooses it. */
  isExtra?: true
  /** What stands in a file; instants and days as ISO. */
  value: (line: Line) => string | number | null
}

export type Filter = {
  label: string
  kind: 'choice' | 'day'
  /** What may be chosen; null: names that are only known from the rows, such as clients. */
  options: readonly string[] | null
  /** What holds where the address says nothing: '' is any. */
  fallback: string
}

export const choice = (label: string, options: readonly string[] | null = null, fallback = ''): Filter => ({
  ...{ label, kind: 'choice', options, fallback },
})
export const day = (label: string): Filter => ({ label, kind: 'day', options: null, fallback: '' })

/** Where in a list its page begins: after, or before, the row that the token names. */
export type Place = { side: 'after' | 'before'; token: string }

export type ListQuery<K extends string = string> = {
  q: string
  sort: string
  order: Order
  filters: Record<K, string>
  /** Keys of the columns shown, in the list's own order. */
  columns: string[]
  place: Place | null
}
export type Order = 'asc' | 'desc'
export type FileFormat = 'csv' | 'xlsx'
export type FileQuery<K extends string = string> = ListQuery<K> & { format: FileFormat }

export type List<Line, K extends string = string> = {
  /** In a file's name and in sentences: "formulas". */
  name: string
  columns: readonly Column<Line>[]
  filters: Record<K, Filter>
  sort: string
  order: Order
  query: z.ZodType<ListQuery<K>>
  fileQuery: z.ZodType<FileQuery<K>>
}

type Given = Record<string, unknown>

/** A list is described once: its page, its address, its search and its files come from this. */
export function describeList<Line>() {
  return <K extends string>(described: {
    name: string
    columns: readonly Column<Line>[]
    filters: Record<K, Filter>
    sort: string
    order?: Order
  }): List<Line, K> => {
    const list = { order: 'asc' as const, ...described }
    return {
      ...list,
      query: z.looseObject({}).transform((given) => read(list, given)),
      fileQuery: z.looseObject({}).transform((given) => ({
        ...read(list, given),
        format: given['format'] === 'xlsx' ? ('xlsx' as const) : ('csv' as const),
      })),
    }
  }
}

export function defaultColumns<Line>(columns: readonly Column<Line>[]): string[] {
  return columns.filter((column) => !column.isExtra).map((column) => column.key)
}

/** What the address does not say, or says wrongly, falls back: a list is never refused because of its address. */
function read<Line, K extends string>(
  list: Pick<List<Line, K>, 'columns' | 'filters' | 'sort' | 'order'>,
  given: Given,
): ListQuery<K> {
  const sorted = list.columns.find((column) => column.sort && column.key === one(given['sort']))
  const wanted = new Set(word(given['columns'], 600).split(','))
  const chosen = list.columns.filter((column) => wanted.has(column.key)).map((column) => column.key)
  const order = one(given['order'])
  const filters = Object.entries<Filter>(list.filters).map(([key, filter]) => [
    key,
    filterOf(filter, given[key]),
  ])
  return {
    q: word(given['q'], 120),
    sort: sorted?.key ?? list.sort,
    order:
      order === 'asc' || order === 'desc' ? order : sorted && sorted.key !== list.sort ? 'asc' : list.order,
    filters: Object.fromEntries(filters) as Record<K, string>,
    columns: chosen.length > 0 ? chosen : defaultColumns(list.columns),
    place: placeOf(given),
  }
}

function filterOf({ kind, options, fallback }: Filter, given: unknown): string {
  const typed = word(given, 100)
  if (kind === 'day') return isDay(typed) ? typed : fallback
  if (options === null) return typed || fallback
  return options.includes(typed) || typed === 'any' ? typed.replace(/^any$/, '') : fallback
}

function placeOf(given: Given): Place | null {
  for (const side of ['after', 'before'] as const) {
    const token = word(given[side], 800)
    if (token) return { side, token }
  }
  return null
}

function isDay(typed: string): boolean {
  return calendarDay().safeParse(typed).success
}

function one(given: unknown): unknown {
  return Array.isArray(given) ? given[0] : given
}

/** PostgreSQL can keep no NUL in text, so it is none to look for either. */
function word(given: unknown, max: number): string {
  const text = one(given)
  return typeof text === 'string' ? text.replaceAll('\0', '').trim().slice(0, max) : ''
}
