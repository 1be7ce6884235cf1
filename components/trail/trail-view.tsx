'use client'

import Link from 'next/link'
import type { ReactNode } from 'react'
import { ListPages } from '@/components/list/list-pages'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { isNarrowed } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import type { TrailPage } from '@/lib/trail/queries'
import type { Change } from '@/lib/trail/rules/changes'
import type { TrailLine } from '@/lib/trail/rules/lines'
import { trailList } from '@/lib/trail/rules/list'

type Props = {
  page: TrailPage
  query: ListQuery
  timeZone: string
  /** Whose entries this person sees, in a sentence. */
  scope: string
}

/** Who did what, when, and why: each changed row as the database wrote it down. */
export function TrailView({ page, query, timeZone, scope }: Props) {
  const { rows } = page
  const isSought = isNarrowed(trailList, query)
  return (
    <>
      <Heading
        crumb={`Record of every change, the latest written first. Times of ${timeZone.replace('_', ' ')}`}
        headline={<Headline line={rows[0]} />}
        sentence={`Written by the database itself, one entry for each changed row; none can be altered. ${scope}`}
      />
      <div className="mt-4">
        <ListTools
          list={trailList}
          path="/trail"
          query={query}
          choices={page.choices}
          searchLabel="Find an entry"
          placeholder="Code, name, reason, what was done"
          total={page.total}
        />
      </div>
      {rows.length === 0 ? (
        <Empty
          title={isSought ? 'No such entry' : 'Nothing is written yet'}
          sentence={isSought ? `Nothing of that kind is in what you may read. ${scope}` : scope}
          act={isSought ? <LinkButton href="/trail">Show everything</LinkButton> : undefined}
        />
      ) : (
        <TrailTable lines={rows} columns={query.columns} />
      )}
      <ListPages list={trailList} path="/trail" query={query} page={page} />
    </>
  )
}

function Headline({ line }: { line: TrailLine | undefined }) {
  if (!line) return <>Nothing is written here</>
  const what = [line.thing || 'Something', line.name].filter(Boolean).join(' ')
  // What a person did with themselves, such as signing in, the application wrote down for them.
  if (line.isEvent && line.name)
    return (
      <>
        <b>{line.name}</b> {line.act}, {line.day}
      </>
    )
  return (
    <>
      {what} {line.act} by <b>{line.who}</b>, {line.day}
    </>
  )
}

/** Entries as a table, and on a phone each as a block of its own. */
export function TrailTable({ lines, columns }: { lines: TrailLine[]; columns: readonly string[] }) {
  const shown = drawn.filter(({ key }) => columns.includes(key))
  return (
    <table className="mt-2 block w-full border-collapse text-15 sm:table">
      <caption className="sr-only">Record, the latest written first</caption>
      <thead className="hidden sm:table-header-group">
        <tr className="border-b-[1.75px] border-ink">
          {shown.map(({ key, title, width }) => (
            <th
              key={key}
              scope="col"
              className={`h-9 px-2 align-bottom text-left text-13 font-430 text-soft first:pl-0 last:pr-0 ${width}`}
            >
              {title}
            </th>
          ))}
        </tr>
      </thead>
      <tbody className="block sm:table-row-group">
        {lines.map((line) => (
          <tr key={line.id} className="block border-b border-hair py-2 align-top sm:table-row sm:py-0">
            {shown.map(({ key, cell, className = '' }) => (
              <td
                key={key}
                className={`block py-0.5 sm:table-cell sm:px-2 sm:py-2 first:pl-0 last:pr-0 ${className}`}
              >
                {cell(line)}
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  )
}

type Drawn = {
  key: string
  title: string
  width: string
  className?: string
  cell: (line: TrailLine) => ReactNode
}

const drawn: Drawn[] = [
  { key: 'entry', title: 'entry', width: 'w-[64px]', className: 'text-soft', cell: (line) => line.id },
  {
    key: 'when',
    title: 'when',
    width: 'w-[150px]',
    cell: (line) => (
      <>
        {line.when}
        {line.isShifted ? <span className="block text-13 text-soft">clock set by the demo</span> : null}
      </>
    ),
  },
  { key: 'who', title: 'who', width: 'w-[120px]', cell: (line) => line.who },
  {
    key: 'what',
    title: 'what',
    width: 'w-[180px]',
    className: 'font-600',
    cell: ({ thing, name, href, act }) => (
      <>
        {thing}{' '}
        {name && href ? (
          <Link href={href} className="underline underline-offset-4">
            {name}
          </Link>
        ) : (
          name
        )}{' '}
        <span className="font-430">{act}</span>
      </>
    ),
  },
  {
    key: 'changes',
    title: 'before and after',
    width: '',
    className: 'min-w-0 text-14 [overflow-wrap:anywhere]',
    cell: (line) => <Changes changes={line.changes} isUpdate={line.isUpdate} />,
  },
  {
    key: 'why',
    title: 'why',
    width: 'w-[20%]',
    cell: ({ reason }) =>
      reason ? (
        <>
          <span className="text-soft sm:hidden">Why: </span>
          {reason}
        </>
      ) : null,
  },
]

/** What was and what is, in words: what is new stands in full ink, what it replaced is struck through. */
function Changes({ changes, isUpdate }: { changes: Change[]; isUpdate: boolean }) {
  if (changes.length === 0) return null
  if (!isUpdate) {
    return (
      <p>
        {changes.map(({ field, before, after }, index) => (
          <span key={field}>
            {index > 0 ? ', ' : ''}
            <span className="text-soft">{field}</span> {after ?? before}
          </span>
        ))}
      </p>
    )
  }
  return (
    <ul>
      {changes.map(({ field, before, after }) => (
        <li key={field}>
          <span className="text-soft">{field}</span>{' '}
          {before === null ? null : (
            <>
              <span className="sr-only">was </span>
              <s className="text-soft">{before}</s>{' '}
            </>
          )}
          {before === null ? null : <span className="text-soft">now </span>}
          {after === null ? <span>nothing</span> : <b className="font-600">{after}</b>}
        </li>
      ))}
    </ul>
  )
}
