import Link from 'next/link'
import type { ReactNode } from 'react'

/** Address that sorts by a column, and how it is sorted now. */
export type Sort = { href: string; now?: 'up' | 'down' }

export type LedgerColumn<Row> = {
  key: string
  title: ReactNode
  cell: (row: Row) => ReactNode
  align?: 'left' | 'right'
  sort?: Sort
  /** Left out below 820 px, or below 640 px. */
  from?: 'tablet' | 'desk'
  width?: string
}

type Props<Row> = {
  /** Read by screen readers, and printed. */
  caption: string
  columns: LedgerColumn<Row>[]
  rows: Row[]
  rowKey: (row: Row) => string
  /** A quiet row, such as one that ended. */
  isQuiet?: (row: Row) => boolean
  empty?: ReactNode
  foot?: ReactNode
}

const from = { tablet: 'hidden sm:table-cell', desk: 'hidden lg:table-cell' }

/** A list: rows of 36 px on hairlines, its head on a line of ink. */
export function Ledger<Row>({ caption, columns, rows, rowKey, isQuiet, empty, foot }: Props<Row>) {
  if (rows.length === 0 && empty) return <>{empty}</>
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-15">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr className="border-b-[1.75px] border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                aria-sort={sortedAs(column.sort)}
                style={column.width ? { width: column.width } : undefined}
                className={`h-9 whitespace-nowrap px-2 align-bottom text-13 font-430 text-soft first:pl-0 last:pr-0 ${cellClass(column)}`}
              >
                {column.sort ? <SortLink title={column.title} sort={column.sort} /> : column.title}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className={`border-b border-hair ${isQuiet?.(row) ? 'text-soft' : ''}`}>
              {columns.map((column) => (
                <td
                  key={column.key}
                  className={`h-11 px-2 py-1 sm:h-9 first:pl-0 last:pr-0 ${cellClass(column)}`}
                >
                  {column.cell(row)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
        {foot ? <tfoot>{foot}</tfoot> : null}
      </table>
    </div>
  )
}

function cellClass(column: { align?: 'left' | 'right'; from?: 'tablet' | 'desk' }): string {
  return `${column.align === 'right' ? 'text-right' : 'text-left'} ${column.from ? from[column.from] : ''}`
}

export function sortedAs(sort: Sort | undefined) {
  if (!sort) return undefined
  if (!sort.now) return 'none'
  return sort.now === 'up' ? 'ascending' : 'descending'
}

export function SortLink({ title, sort: { href, now } }: { title: ReactNode; sort: Sort }) {
  return (
    <Link href={href} className={`inline-flex items-baseline gap-1 ${now ? 'font-700 text-ink' : ''}`}>
      <span className="underline-offset-4 hover:underline">{title}</span>
      <svg viewBox="0 0 8 8" width="8" height="8" aria-hidden className={now ? '' : 'opacity-0'}>
        <path d={now === 'down' ? 'M0 1H8L4 7Z' : 'M0 7H8L4 1Z'} fill="currentColor" />
      </svg>
    </Link>
  )
}
