'use client'

import Link from 'next/link'
import { useRef, type KeyboardEvent } from 'react'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { StandingMark } from '@/components/marks/standing-mark'
import { isNarrowed, listAddress } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import type { Ledger as LedgerPage } from '@/lib/study/queries/ledger'
import { spokenDay } from '@/lib/study/rules/calendar'
import type { LedgerRow } from '@/lib/study/rules/ledger'
import { batchNames, standingNote, studyList } from '@/lib/study/rules/list'
import { WorstShelf } from './worst-shelf'

type Props = {
  ledger: LedgerPage
  query: ListQuery
  mayStart: boolean
  lab: { name: string; timeZone: string }
}

/** All studies as a ledger: each shows its worst shelf in miniature, and the last column says who is next. */
export function StudyLedger({ ledger, query, mayStart, lab }: Props) {
  const table = useRef<HTMLDivElement>(null)
  const { rows, counts, headline, sentence } = ledger
  const is = query.filters['is']
  const inState = (state: string) => listAddress('/studies', studyList, query, { filters: { is: state } })

  /** j and k walk the rows, as the arrow keys of a list would. */
  function walk(event: KeyboardEvent) {
    if (event.target instanceof HTMLInputElement || event.target instanceof HTMLSelectElement) return
    const step = event.key === 'j' ? 1 : event.key === 'k' ? -1 : 0
    if (step === 0 || event.metaKey || event.ctrlKey || event.altKey) return
    const links = [...(table.current?.querySelectorAll<HTMLAnchorElement>('a[data-study]') ?? [])]
    const at = links.indexOf(document.activeElement as HTMLAnchorElement)
    links[Math.min(links.length - 1, Math.max(0, at + step))]?.focus()
    event.preventDefault()
  }

  return (
    <div onKeyDown={walk}>
      <Heading
        crumb={`${lab.name}. ${is === 'closed' ? 'Ended' : 'Running'} studies${sortWords[query.sort] ?? ''}`}
        headline={
          <>
            <b>{headline[0]}</b>
            {headline[1]}
          </>
        }
        sentence={sentence || undefined}
        tabsLabel="Running and ended studies"
        tabs={[
          { href: inState('running'), label: 'Running', count: counts.running, isHere: is === 'running' },
          { href: inState('closed'), label: 'Ended', count: counts.closed, isHere: is === 'closed' },
        ]}
        acts={
          mayStart ? (
            <LinkButton href="/studies/new" kind="primary">
              Start a study
            </LinkButton>
          ) : undefined
        }
      />
      <div className="mt-4">
        <ListTools
          list={studyList}
          path="/studies"
          query={query}
          choices={ledger.choices}
          without={mayStart || ledger.choices.client.length > 0 ? ['is'] : ['is', 'client', 'station', 'by']}
          searchLabel="Find a study"
          placeholder="Batch, formula, client, jar"
          total={ledger.total}
        />
      </div>
      <div ref={table} className="mt-2">
        <ListLedger
          list={studyList}
          path="/studies"
          query={query}
          page={ledger}
          caption="Studies"
          timeZone={lab.timeZone}
          rowKey={(row) => row.id}
          cells={cells}
          empty={<NoStudy query={query} mayStart={mayStart} />}
        />
      </div>
      {rows.length > 0 ? (
        <p data-screen-only className="mt-3 flex flex-wrap justify-between gap-x-8 gap-y-1 text-13 text-soft">
          <span className="hidden lg:inline">
            <kbd className="rounded border border-rule px-1.5 font-mono text-13">j</kbd>{' '}
            <kbd className="rounded border border-rule px-1.5 font-mono text-13">k</kbd> move, Enter opens the
            sheet
          </span>
          <span>Bold in the last column: yours. A dotted jar is due or still to come.</span>
        </p>
      ) : null}
    </div>
  )
}

const sortWords: Record<string, string> = {
  standing: ', worst first',
  code: ', by code',
  next: ', next pull first',
}

const cells: Parameters<typeof ListLedger<LedgerRow>>[0]['cells'] = {
  code: {
    width: '68px',
    cell: (row) => (
      <Link
        data-study
        href={`/studies/${encodeURIComponent(row.code)}`}
        className="font-600 whitespace-nowrap underline-offset-4 hover:underline"
      >
        {row.code}
      </Link>
    ),
  },
  batch: {
    cell: (row) => (
      <span className="block max-w-[118px] truncate sm:max-w-[230px]" title={row.title}>
        <b className="font-650">{batchNames(row.batches)}</b>
        {row.references.length > 0 ? ` beside ${batchNames(row.references)},` : ''} {row.formulaName}
      </span>
    ),
  },
  client: { from: 'desk' },
  shelf: { from: 'desk', cell: (row) => <WorstShelf row={row} /> },
  standing: { align: 'left', cell: (row) => <StandingCell row={row} /> },
  next: { from: 'tablet', width: '150px', cell: (row) => <NextPull row={row} /> },
  who: {
    from: 'tablet',
    cell: (row) => (
      <span className={`whitespace-nowrap ${row.isMine ? 'font-700' : ''}`}>{row.whoIsNext}</span>
    ),
  },
}

function StandingCell({ row }: { row: LedgerRow }) {
  const isAlarm = row.standing === 'out' || row.standing === 'leaning'
  return (
    <span className="flex items-center gap-2.5 whitespace-nowrap">
      <StandingMark standing={row.standing} size={20} />
      <span
        className={
          isAlarm
            ? `text-alarm ${row.standing === 'out' ? 'font-750' : 'font-650'}`
            : row.standing === 'untold'
              ? 'text-soft'
              : ''
        }
      >
        {row.standing}
      </span>
      <span className={`hidden text-14 xl:inline ${isAlarm ? '' : 'text-soft'}`}>{standingNote(row)}</span>
    </span>
  )
}

function NextPull({ row }: { row: LedgerRow }) {
  if (row.nextPullOn === null) return <span className="text-soft">done</span>
  const { due, done } = row.jarsNext
  return (
    <span className="flex gap-3 whitespace-nowrap">
      <span className={`min-w-[52px] ${row.isToday ? 'font-700' : ''}`}>
        {row.isToday ? 'today' : spokenDay(row.nextPullOn, false)}
      </span>
      <span className="hidden text-14 text-soft xl:inline">
        {row.isToday ? `${done} of ${due} in` : `${due} ${due === 1 ? 'jar' : 'jars'}`}
      </span>
    </span>
  )
}

function NoStudy({ query, mayStart }: { query: ListQuery; mayStart: boolean }) {
  const isClosed = query.filters['is'] === 'closed'
  const { is: _, ...others } = studyList.filters
  if (isNarrowed({ filters: others }, query)) {
    return (
      <Empty
        title={
          query.q
            ? `No ${isClosed ? 'ended' : 'running'} study has ${query.q}.`
            : `None is ${query.filters['standing'] || 'of that kind'}.`
        }
        sentence="The search looks in codes, titles, batches, formulas, clients and jar codes."
        act={<LinkButton href="/studies">Show all running studies</LinkButton>}
      />
    )
  }
  return (
    <Empty
      title={isClosed ? 'No study has ended' : 'No study runs yet'}
      sentence="A study puts a batch's jars on the stations of a protocol and says when each is pulled."
      act={
        mayStart && !isClosed ? (
          <LinkButton href="/studies/new" kind="primary">
            Start the first study
          </LinkButton>
        ) : undefined
      }
    />
  )
}
