'use client'

import Link from 'next/link'
import { FlagMark } from '@/components/marks/flag-mark'
import { heatWeight } from '@/components/marks/heat'
import { StandingMark } from '@/components/marks/standing-mark'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import type { FlagCounts, FlagLine, FlagsPage } from '@/lib/flag/queries/list'
import { flagList, stationText } from '@/lib/flag/rules/list'
import { flagStates } from '@/lib/flag/schema'
import { listAddress } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { levelStanding, levelWord, whoIsNext, whole } from './flag-words'
import type { FlagRights } from './rights'

type Props = { page: FlagsPage; query: ListQuery; rights: FlagRights; timeZone: string }

/** All flags as a ledger: what wants an answer first, and the last column says who is next. */
export function FlagList({ page, query, rights, timeZone }: Props) {
  const { counts, choices, total } = page
  const { state, study } = query.filters
  return (
    <>
      <Heading
        crumb={study ? `Flags of study ${study}, gravest first` : 'Flags of every study, gravest first'}
        headline={<Headline counts={counts} />}
        sentence={sentence(counts, timeZone)}
        acts={<LinkButton href="/flags/trust">How far to trust a flag</LinkButton>}
        tabsLabel="Open, answered and closed flags"
        tabs={flagStates.map((one) => ({
          href: listAddress('/flags', flagList, query, { filters: { state: one } }),
          label: capital(one),
          count: counts[one],
          isHere: state === one,
        }))}
      />
      <div className="mt-4">
        <ListTools
          list={flagList}
          path="/flags"
          query={query}
          choices={choices}
          without={['state']}
          searchLabel="Find a flag"
          placeholder="Number, words, study, batch"
          total={total}
        />
      </div>
      <div className="mt-2">
        <ListLedger
          list={flagList}
          path="/flags"
          query={query}
          page={page}
          caption={`${capital(state ?? '')} flags`}
          timeZone={timeZone}
          rowKey={(flag) => String(flag.number)}
          cells={cellsFor(rights, timeZone)}
          empty={<NoFlag query={query} />}
        />
      </div>
    </>
  )
}

function Headline({ counts: { open, answered } }: { counts: FlagCounts }) {
  if (open > 0) {
    return (
      <>
        <b>{capital(counted(open, 'flag'))}</b> {open === 1 ? 'wants' : 'want'} an answer
      </>
    )
  }
  if (answered > 0) {
    return (
      <>
        <b>{capital(counted(answered, 'flag'))}</b> {answered === 1 ? 'waits' : 'wait'} for QA
      </>
    )
  }
  return <>No flag wants an answer</>
}

function sentence(counts: FlagCounts, timeZone: string): string {
  const { open, answered: waiting, closed, out, leaning, doubts, oldest } = counts
  const parts = [
    out > 0 ? `${counted(out, 'series', 'series')} out` : '',
    leaning > 0 ? `${leaning === 1 ? 'one' : counted(leaning, '', '').trim()} leaning` : '',
    doubts > 0 ? counted(doubts, 'doubt') : '',
  ].filter(Boolean)
  return [
    parts.length > 0 ? `${capital(parts.join(', '))}.` : '',
    oldest ? `The oldest waits since ${spokenDay(dayIn(timeZone, oldest))}.` : '',
    open > 0 && waiting > 0
      ? `${capital(counted(waiting, 'answer'))} ${waiting === 1 ? 'waits' : 'wait'} for QA.`
      : '',
    open + waiting + closed === 0
      ? 'The rules raise one when a reading or a trend needs somebody’s word.'
      : '',
  ]
    .filter(Boolean)
    .join(' ')
}

function cellsFor(rights: FlagRights, timeZone: string): Parameters<typeof ListLedger<FlagLine>>[0]['cells'] {
  return {
    number: {
      width: '52px',
      align: 'left',
      cell: (flag) => (
        <FlagMark number={flag.number} solid={flag.level === 'out'} title={`Flag ${flag.number}`} />
      ),
    },
    sentence: {
      cell: (flag) => (
        <Link
          href={`/flags/${flag.number}`}
          className="block underline-offset-4 hover:underline lg:line-clamp-1"
          title={flag.sentence}
        >
          <span className={flag.state === 'closed' ? '' : 'font-600'}>{whole(flag.sentence)}</span>
          <span className="block text-13 text-soft sm:hidden">
            {flag.studyCode}, {levelWord(flag)}; {whoIsNext(flag, rights).text}
          </span>
        </Link>
      ),
    },
    study: {
      from: 'tablet',
      width: '120px',
      cell: (flag) => (
        <span className="whitespace-nowrap" title={flag.studyTitle}>
          {flag.studyCode} <span className="text-soft">{flag.batchCode}</span>
        </span>
      ),
    },
    station: {
      from: 'desk',
      width: '96px',
      cell: (flag) => (
        <span
          className="whitespace-nowrap"
          style={{
            fontWeight: flag.temperatureC === null || flag.isFreezeThaw ? 430 : heatWeight(flag.temperatureC),
          }}
        >
          {stationText(flag)}
        </span>
      ),
    },
    raised: {
      from: 'desk',
      width: '120px',
      cell: (flag) => (
        <span className="whitespace-nowrap">
          {spokenDay(dayIn(timeZone, flag.raisedAt))} <span className="text-soft">{flag.raisedBy}</span>
        </span>
      ),
    },
    level: { width: '124px', from: 'tablet', cell: (flag) => <Level flag={flag} /> },
    next: {
      from: 'desk',
      width: '190px',
      cell: (flag) => {
        const { text, isMine } = whoIsNext(flag, rights)
        return <span className={`whitespace-nowrap ${isMine ? 'font-700' : ''}`}>{text}</span>
      },
    },
  }
}

function Level({ flag }: { flag: FlagLine }) {
  const standing = levelStanding(flag)
  const isAlarm = flag.state !== 'closed' && (flag.level === 'out' || flag.level === 'leaning')
  return (
    <span className={`flex items-center gap-2.5 whitespace-nowrap ${isAlarm ? 'font-700 text-alarm' : ''}`}>
      <span className="w-5">{standing ? <StandingMark standing={standing} size={20} /> : null}</span>
      {levelWord(flag)}
    </span>
  )
}

function NoFlag({ query }: { query: ListQuery }) {
  const { state, ...others } = query.filters
  const of = others['study'] ? ` of study ${others['study']}` : ''
  const isSought = query.q !== '' || Object.values(others).some((value) => value !== '')
  const act = isSought ? (
    <LinkButton href={state === 'open' ? '/flags' : `/flags?state=${state}`}>Show every flag</LinkButton>
  ) : undefined
  if (query.q) return <Empty title={`No ${state} flag${of} has ${query.q}.`} act={act} />
  if (state === 'answered') {
    return (
      <Empty
        title={`No answer${of} waits`}
        sentence="What is out at a station that decides waits here until QA closes it."
        act={act}
      />
    )
  }
  if (state === 'closed') return <Empty title={`No flag${of} is closed yet`} act={act} />
  return (
    <Empty
      title={`No flag${of} wants an answer`}
      sentence="When a reading leaves its band or a trend leads there, it stands here with its numbers."
      act={act}
    />
  )
}
