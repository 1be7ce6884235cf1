import type { ReactNode } from 'react'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import type { ListPage } from '@/lib/list/queries/page'
import { isAsAlways } from '@/lib/list/rules'
import type { Column, List, ListQuery } from '@/lib/list/schema'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { ListPages } from './list-pages'
import { sortBy } from './sort-head'

type Drawn<Row> = Omit<LedgerColumn<Row>, 'key' | 'title' | 'sort'>

type Props<Row> = {
  list: List<Row>
  path: string
  query: ListQuery
  page: ListPage<Row>
  /** How a column is drawn where its plain value is not enough. */
  cells: Record<string, Partial<Drawn<Row>>>
  /** Columns that are no data: a tick before the others, an act after them. */
  before?: LedgerColumn<Row>[]
  after?: LedgerColumn<Row>[]
  caption: string
  /** The lab's, in which its days are told. */
  timeZone: string
  rowKey: (row: Row) => string
  isQuiet?: (row: Row) => boolean
  empty?: ReactNode
}

/** One page of a list as a ledger of the chosen columns. */
export function ListLedger<Row>(props: Props<Row>) {
  const { list, path, query, page, cells, timeZone, before = [], after = [], ...rest } = props
  // Columns that somebody chose are all shown; the usual ones give way on a small screen.
  const isChosen = !isAsAlways(list, query.columns)
  const columns = list.columns
    .filter((column) => query.columns.includes(column.key))
    .map((column) => {
      const { from, ...cell } = cells[column.key] ?? {}
      return {
        key: column.key,
        title: column.title,
        align: column.kind === 'number' ? ('right' as const) : ('left' as const),
        cell: (row: Row) => plain(column, row, timeZone, isChosen),
        ...cell,
        ...(isChosen || !from ? {} : { from }),
        ...(column.sort ? { sort: sortBy(list, path, query, column) } : {}),
      }
    })
  return (
    <>
      <Ledger {...rest} columns={[...before, ...columns, ...after]} rows={page.rows} />
      <ListPages list={list} path={path} query={query} page={page} />
    </>
  )
}

function plain<Row>(column: Column<Row>, row: Row, timeZone: string, isChosen: boolean): ReactNode {
  const value = column.value(row)
  // Many chosen columns scroll sideways; a name among them then keeps the room of a few words to a line.
  if (isChosen && typeof value === 'string' && (column.kind ?? 'text') === 'text')
    return (
      <span className="block" style={{ minWidth: `${Math.min(value.length, 24)}ch` }}>
        {value}
      </span>
    )
  if (column.kind === undefined || column.kind === 'text' || value === null) return value
  const text = column.kind === 'number' ? value : spokenDay(dayOf(column.kind, String(value), timeZone))
  return <span className="whitespace-nowrap">{text}</span>
}

function dayOf(kind: 'day' | 'instant', value: string, timeZone: string): string {
  return kind === 'day' ? value : dayIn(timeZone, value)
}
