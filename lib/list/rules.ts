import {
  defaultColumns,
  type Column,
  type FileFormat,
  type Filter,
  type List,
  type ListQuery,
} from './schema'

type Address = Pick<List<never>, 'sort' | 'order' | 'filters'> & { columns: readonly Column<never>[] }
type Change = Partial<Omit<ListQuery, 'filters'>> & { filters?: Record<string, string> }

/** What is shown stands in the address, so that a view can be shared and gone back to; what goes without saying is left out. */
export function listAddress(path: string, list: Address, query: ListQuery, change: Change = {}): string {
  const search = searchOf(list, query, change)
  return search.size > 0 ? `${path}?${search}` : path
}

/** The file of all pages of what is shown. */
export function fileAddress(path: string, list: Address, query: ListQuery, format: FileFormat): string {
  const search = searchOf(list, query, { place: null })
  search.set('format', format)
  return `/api${path}/export?${search}`
}

function searchOf(list: Address, query: ListQuery, change: Change): URLSearchParams {
  // Anything but turning the page or choosing columns begins again at the first page.
  const isSameRows = Object.keys(change).every((key) => key === 'columns')
  const next = { ...query, ...change, filters: { ...query.filters, ...change.filters } }
  const place = change.place === undefined ? (isSameRows ? query.place : null) : change.place
  const isSortedAsAlways = next.sort === list.sort && next.order === list.order
  const filters = Object.entries<Filter>(list.filters).flatMap(([key, { fallback }]) => {
    const value = next.filters[key] ?? ''
    return value === fallback ? [] : [[key, value || 'any']]
  })
  return new URLSearchParams([
    ...(next.q.trim() ? [['q', next.q.trim()]] : []),
    ...filters,
    ...(isSortedAsAlways
      ? []
      : [
          ['sort', next.sort],
          ['order', next.order],
        ]),
    ...(isAsAlways(list, next.columns) ? [] : [['columns', next.columns.join(',')]]),
    ...(place ? [[place.side, place.token]] : []),
  ])
}

export function isAsAlways(list: Pick<Address, 'columns'>, columns: readonly string[]): boolean {
  return defaultColumns(list.columns).join() === columns.join()
}

/** Whether a search or a filter leaves rows out; what a list begins with does not count. */
export function isNarrowed(list: Pick<Address, 'filters'>, query: ListQuery): boolean {
  return (
    query.q !== '' ||
    Object.entries<Filter>(list.filters).some(([key, { fallback }]) => query.filters[key] !== fallback)
  )
}
