import Link from 'next/link'
import type { ListPage } from '@/lib/list/queries/page'
import { listAddress } from '@/lib/list/rules'
import type { List, ListQuery, Place } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'

type Props<Line> = {
  list: List<Line>
  path: string
  query: ListQuery
  page: Pick<ListPage<unknown>, 'total' | 'before' | 'previous' | 'next'> & { rows: unknown[] }
}

/** Where in the list one is, and the pages beside this one. */
export function ListPages<Line>({ list, path, query, page }: Props<Line>) {
  const { rows, total, before, previous, next } = page
  if (!previous && !next) return null
  const to = (place: Place | null) => listAddress(path, list, query, { place })
  const link = 'inline-flex min-h-11 items-center underline underline-offset-4'
  return (
    <nav
      aria-label={`Pages of the ${list.name}`}
      data-screen-only
      className="mt-3 flex flex-wrap items-center gap-x-8 text-15"
    >
      {total === null || before === null ? null : (
        <span className="text-soft">
          {grouped(before + 1, 0)} to {grouped(before + rows.length, 0)} of {grouped(total, 0)}
        </span>
      )}
      {previous ? (
        <Link href={to(null)} className={link}>
          First page
        </Link>
      ) : null}
      {previous ? (
        <Link rel="prev" href={to({ side: 'before', token: previous })} className={link}>
          Previous page
        </Link>
      ) : null}
      {next ? (
        <Link rel="next" href={to({ side: 'after', token: next })} className={link}>
          Next page
        </Link>
      ) : null}
    </nav>
  )
}
