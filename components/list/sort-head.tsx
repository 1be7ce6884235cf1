import { sortedAs, SortLink, type Sort } from '@/components/ui/ledger'
import { listAddress } from '@/lib/list/rules'
import type { Column, List, ListQuery } from '@/lib/list/schema'

type Props<Line> = { list: List<Line>; path: string; query: ListQuery; column: Column<Line> }

/** The head of a column in a table that draws its rows itself. */
export function SortHead<Line>({ list, path, query, column }: Props<Line>) {
  const sort = column.sort ? sortBy(list, path, query, column) : undefined
  return (
    <th
      scope="col"
      aria-sort={sortedAs(sort)}
      className={`whitespace-nowrap ${column.kind === 'number' ? 'text-right' : ''}`}
    >
      {sort ? <SortLink title={column.title} sort={sort} /> : column.title}
    </th>
  )
}

/** The address that sorts by a column, and how it is sorted now; a second press turns it round. */
export function sortBy<Row>(list: List<Row>, path: string, query: ListQuery, { key }: Column<Row>): Sort {
  const isNow = query.sort === key
  const first = key === list.sort ? list.order : 'asc'
  const order = isNow ? (query.order === 'asc' ? ('desc' as const) : ('asc' as const)) : first
  return {
    href: listAddress(path, list, query, { sort: key, order }),
    ...(isNow ? { now: query.order === 'asc' ? ('up' as const) : ('down' as const) } : {}),
  }
}
