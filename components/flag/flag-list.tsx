'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import useSWR from 'swr'
import { FlagMark } from '@/components/marks/flag-mark'
import { heatWeight } from '@/components/marks/heat'
import { StandingMark } from '@/components/marks/standing-mark'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import { Select } from '@/components/ui/select'
import type { FlagLine } from '@/lib/flag/queries/list'
import { flagKeys, flagStates } from '@/lib/flag/schema'
import { fetcher } from '@/lib/http/fetcher'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { flagsAddress, type ShownFlags } from './flag-filter'
import { levelStanding, levelWord, stationText, whoIsNext, whole } from './flag-words'
import type { FlagRights } from './rights'

type Props = { shown: ShownFlags; rights: FlagRights; timeZone: string }

/** All flags as a ledger: what wants an answer first, and the last column says who is next. */
export function FlagList({ shown, rights, timeZone }: Props) {
  const { data: all } = useSWR<FlagLine[]>(flagKeys.list, fetcher)
  const router = useRouter()
  if (!all) return null
  const flags = shown.study ? all.filter((flag) => flag.studyCode === shown.study) : all
  const rows = flags.filter((flag) => flag.state === shown.state)
  const studies = [...new Map(all.map((flag) => [flag.studyCode, flag.studyTitle]))].toSorted(([a], [b]) =>
    b.localeCompare(a),
  )
  return (
    <>
      <Heading
        crumb={
          shown.study ? `Flags of study ${shown.study}, gravest first` : 'Flags of every study, gravest first'
        }
        headline={<Headline flags={flags} />}
        sentence={sentence(flags, timeZone)}
        acts={<LinkButton href="/flags/trust">How far to trust a flag</LinkButton>}
        tabsLabel="Open, answered and closed flags"
        tabs={flagStates.map((state) => ({
          href: flagsAddress({ ...shown, state }),
          label: capital(state),
          count: flags.filter((flag) => flag.state === state).length,
          isHere: shown.state === state,
        }))}
      />
      <form data-screen-only className="mt-4" onSubmit={(event) => event.preventDefault()}>
        <Select
          label="Study"
          hideLabel
          value={shown.study ?? ''}
          empty="Study: any"
          options={studies.map(([code, title]) => ({ value: code, label: `${code} ${title}` }))}
          onPick={(study) =>
            router.replace(flagsAddress({ ...shown, study: study || null }), { scroll: false })
          }
          wrap="w-full sm:w-[320px]"
        />
      </form>
      <div className="mt-2">
        <Ledger
          caption={`${capital(shown.state)} flags`}
          rows={rows}
          rowKey={(flag) => String(flag.number)}
          columns={columns(rights, timeZone)}
          empty={<NoFlag shown={shown} />}
        />
      </div>
    </>
  )
}

function Headline({ flags }: { flags: FlagLine[] }) {
  const open = flags.filter((flag) => flag.state === 'open').length
  const answered = flags.filter((flag) => flag.state === 'answered').length
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

function sentence(flags: FlagLine[], timeZone: string): string {
  const open = flags.filter((flag) => flag.state === 'open')
  const of = (level: string) => open.filter((flag) => flag.level === level).length
  const [out, leaning, doubts] = [of('out'), of('leaning'), of('doubt')]
  const parts = [
    out > 0 ? `${counted(out, 'series', 'series')} out` : '',
    leaning > 0 ? `${leaning === 1 ? 'one' : counted(leaning, '', '').trim()} leaning` : '',
    doubts > 0 ? counted(doubts, 'doubt') : '',
  ].filter(Boolean)
  const oldest = open.map((flag) => flag.raisedAt).toSorted()[0]
  const waiting = flags.filter((flag) => flag.state === 'answered').length
  return [
    parts.length > 0 ? `${capital(parts.join(', '))}.` : '',
    oldest ? `The oldest waits since ${spokenDay(dayIn(timeZone, oldest))}.` : '',
    open.length > 0 && waiting > 0
      ? `${capital(counted(waiting, 'answer'))} ${waiting === 1 ? 'waits' : 'wait'} for QA.`
      : '',
    flags.length === 0 ? 'The rules raise one when a reading or a trend needs somebody’s word.' : '',
  ]
    .filter(Boolean)
    .join(' ')
}

function columns(rights: FlagRights, timeZone: string): LedgerColumn<FlagLine>[] {
  return [
    {
      key: 'number',
      title: 'flag',
      width: '52px',
      cell: (flag) => (
        <FlagMark number={flag.number} solid={flag.level === 'out'} title={`Flag ${flag.number}`} />
      ),
    },
    {
      key: 'sentence',
      title: 'what it says',
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
    {
      key: 'study',
      title: 'study',
      from: 'tablet',
      width: '120px',
      cell: (flag) => (
        <span className="whitespace-nowrap" title={flag.studyTitle}>
          {flag.studyCode} <span className="text-soft">{flag.batchCode}</span>
        </span>
      ),
    },
    {
      key: 'station',
      title: 'station',
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
    {
      key: 'raised',
      title: 'raised',
      from: 'desk',
      width: '120px',
      cell: (flag) => (
        <span className="whitespace-nowrap">
          {spokenDay(dayIn(timeZone, flag.raisedAt))} <span className="text-soft">{flag.raisedBy}</span>
        </span>
      ),
    },
    {
      key: 'level',
      title: 'level',
      width: '124px',
      from: 'tablet',
      cell: (flag) => <Level flag={flag} />,
    },
    {
      key: 'next',
      title: 'who is next',
      from: 'desk',
      width: '190px',
      cell: (flag) => {
        const { text, isMine } = whoIsNext(flag, rights)
        return <span className={`whitespace-nowrap ${isMine ? 'font-700' : ''}`}>{text}</span>
      },
    },
  ]
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

function NoFlag({ shown }: { shown: ShownFlags }) {
  const of = shown.study ? ` of study ${shown.study}` : ''
  const act = shown.study ? (
    <LinkButton href={flagsAddress({ ...shown, study: null })}>Show every study</LinkButton>
  ) : undefined
  if (shown.state === 'answered') {
    return (
      <Empty
        title={`No answer${of} waits`}
        sentence="What is out at a station that decides waits here until QA closes it."
        act={act}
      />
    )
  }
  if (shown.state === 'closed') return <Empty title={`No flag${of} is closed yet`} act={act} />
  return (
    <Empty
      title={`No flag${of} wants an answer`}
      sentence="When a reading leaves its band or a trend leads there, it stands here with its numbers."
      act={act}
    />
  )
}
