'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useRef, type KeyboardEvent } from 'react'
import useSWR from 'swr'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import { StandingMark } from '@/components/marks/standing-mark'
import { fetcher } from '@/lib/http/fetcher'
import type { Ledger as LedgerPage } from '@/lib/study/queries/ledger'
import { addDays, spokenDay } from '@/lib/study/rules/calendar'
import { inSentence } from '@/lib/study/rules/finding'
import type { LedgerRow } from '@/lib/study/rules/ledger'
import { counted } from '@/lib/study/rules/words'
import { studyKeys, type StudyFilter } from '@/lib/study/schema'
import { LedgerFilter } from './ledger-filter'
import { WorstShelf } from './worst-shelf'

type Props = { filter: StudyFilter; mayStart: boolean; labName: string }

/** All studies as a ledger: each shows its worst shelf in miniature, and the last column says who is next. */
export function StudyLedger({ filter, mayStart, labName }: Props) {
  const { data } = useSWR<LedgerPage>(studyKeys.list(filter), fetcher, { keepPreviousData: true })
  const table = useRef<HTMLDivElement>(null)
  const router = useRouter()
  if (!data) return null
  const { rows, counts, headline, sentence } = data

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
        crumb={`${labName}. ${filter.is === 'running' ? 'Running' : 'Ended'} studies${sortWords[filter.sort]}`}
        headline={
          <>
            <b>{headline[0]}</b>
            {headline[1]}
          </>
        }
        sentence={sentence || undefined}
        tabsLabel="Running and ended studies"
        tabs={[
          {
            href: address({ ...filter, is: 'running' }),
            label: 'Running',
            count: counts.running,
            isHere: filter.is === 'running',
          },
          {
            href: address({ ...filter, is: 'closed' }),
            label: 'Ended',
            count: counts.closed,
            isHere: filter.is === 'closed',
          },
        ]}
        acts={
          mayStart ? (
            <LinkButton href="/studies/new" kind="primary">
              Start a study
            </LinkButton>
          ) : undefined
        }
      />
      <LedgerFilter filter={filter} onChange={(next) => router.replace(address(next), { scroll: false })} />
      <div ref={table} className="mt-2">
        <Ledger
          caption="Studies"
          columns={columnsFor(filter)}
          rows={rows}
          rowKey={(row) => row.id}
          empty={<NoStudy filter={filter} mayStart={mayStart} />}
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

const sortWords = { worst: ', worst first', code: ', newest first', next: ', next pull first' }

export function address(filter: StudyFilter): string {
  const search = new URLSearchParams({ is: filter.is, sort: filter.sort })
  if (filter.q) search.set('q', filter.q)
  if (filter.standing !== 'any') search.set('standing', filter.standing)
  return `/studies?${search}`
}

function columnsFor(filter: StudyFilter): LedgerColumn<LedgerRow>[] {
  const sortBy = (sort: StudyFilter['sort'], now: 'up' | 'down') => ({
    href: address({ ...filter, sort }),
    ...(filter.sort === sort ? { now } : {}),
  })
  return [
    {
      key: 'code',
      title: 'study',
      width: '68px',
      sort: sortBy('code', 'down'),
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
    {
      key: 'batch',
      title: 'batch and formula',
      cell: (row) => (
        <span className="block max-w-[118px] truncate sm:max-w-[230px]" title={row.title}>
          <b className="font-650">{batchNames(row.batches)}</b> {row.formulaName}
        </span>
      ),
    },
    { key: 'client', title: 'client', from: 'desk', cell: (row) => row.clientName ?? '' },
    {
      key: 'shelf',
      title: 'worst shelf, each to its own time',
      from: 'desk',

      cell: (row) => <WorstShelf row={row} />,
    },
    {
      key: 'standing',
      title: 'standing',
      sort: sortBy('worst', 'down'),
      cell: (row) => <StandingCell row={row} />,
    },
    {
      key: 'next',
      title: 'next pull',
      from: 'tablet',
      width: '150px',
      sort: sortBy('next', 'up'),
      cell: (row) => <NextPull row={row} />,
    },
    {
      key: 'who',
      title: 'who is next',
      from: 'tablet',
      cell: (row) => (
        <span className={`whitespace-nowrap ${row.isMine ? 'font-700' : ''}`}>{row.whoIsNext}</span>
      ),
    },
  ]
}

function batchNames(codes: string[]): string {
  return codes.length > 2 ? `${codes[0]} to ${codes.at(-1)}` : codes.join(' and ')
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

function standingNote({ standing, worst, timePoints, startedOn }: LedgerRow): string {
  if (worst?.isPending) return `${inSentence(worst.attribute)}, to be confirmed`
  if (standing === 'untold' || !worst) {
    return timePoints > 1 ? counted(timePoints, 'time point') : 'nothing read yet'
  }
  const name = inSentence(worst.attribute)
  if (standing === 'leaning' && worst.leavesAtWeeks !== null) {
    return `${name}, ${spokenDay(addDays(startedOn, Math.round(worst.leavesAtWeeks * 7)), false)}`
  }
  return worst.used === null ? name : `${name}, ${Math.round(worst.used * 100)} %`
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

function NoStudy({ filter, mayStart }: { filter: StudyFilter; mayStart: boolean }) {
  if (filter.q || filter.standing !== 'any') {
    return (
      <Empty
        title={
          filter.q
            ? `No ${filter.is === 'closed' ? 'ended' : 'running'} study has ${filter.q}.`
            : `None is ${filter.standing}.`
        }
        sentence="The search looks in codes, titles, batches, formulas, clients and jar codes."
        act={<LinkButton href="/studies">Show all running studies</LinkButton>}
      />
    )
  }
  return (
    <Empty
      title={filter.is === 'closed' ? 'No study has ended' : 'No study runs yet'}
      sentence="A study puts a batch's jars on the stations of a protocol and says when each is pulled."
      act={
        mayStart && filter.is === 'running' ? (
          <LinkButton href="/studies/new" kind="primary">
            Start the first study
          </LinkButton>
        ) : undefined
      }
    />
  )
}
