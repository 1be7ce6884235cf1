import type { SeriesFinding, Standing } from '@/lib/science/series'
import type { StudyFilter, studySorts } from '@/lib/study/schema'
import { worstOf, type CellState, type Posture } from './cells'
import { capital, counted, numberWord } from './words'

export type LedgerRow = {
  id: string
  code: string
  title: string
  state: string
  batches: string[]
  formulaName: string
  clientName: string | null
  startedOn: string
  endWeeks: number
  elapsedWeeks: number
  standing: Standing
  /** The series that gives the standing, or the one nearest its edge. */
  worst: {
    attribute: string
    label: string
    used: number | null
    latest: number | null
    leavesAtWeeks: number | null
  } | null
  station: {
    kind: string
    temperatureC: number | null
    cells: {
      weeks: number
      state: CellState
      posture: Posture
      topPercent: number | null
      bottomPercent: number | null
    }[]
  } | null
  timePoints: number
  nextPullOn: string | null
  isToday: boolean
  jarsNext: { due: number; done: number }
  flags: number
  whoIsNext: string
  isMine: boolean
}

type Series = {
  batchId: string
  studyStationId: string
  attribute: string
  standing: Standing
  used: number | null
  latestValue: number | null
  leavesAtWeeks: number | null
  finding: SeriesFinding
}
type Station = { id: string; kind: string; temperatureC: number | null }

const ranks: Standing[] = ['untold', 'steady', 'leaning', 'out']

/** The shelf to look at first: the worst standing, then the most of its band used, else the hottest one. */
export function worstShelf(series: Series[], stations: Station[]) {
  const worst = series.toSorted(
    (a, b) => ranks.indexOf(b.standing) - ranks.indexOf(a.standing) || (b.used ?? 0) - (a.used ?? 0),
  )[0]
  const hottest = stations.toSorted((a, b) => (b.temperatureC ?? -1000) - (a.temperatureC ?? -1000))[0]
  const isTold = worst !== undefined && worst.standing !== 'untold'
  return {
    standing: worstOf(series.map((one) => one.standing)),
    series: isTold ? worst : null,
    station: (isTold ? stations.find((one) => one.id === worst.studyStationId) : hottest) ?? null,
  }
}

/** Who is next: whoever answers flags, signs, ends the study; otherwise the Bench pulls. */
export function nextOne(
  study: { today: string; startedBy: string; state: string },
  own: {
    pullJars: { dueOn: string; windowTo: string; state: string }[]
    openFlags: number
    caseToSign: string | null
  },
) {
  const waiting = own.pullJars
    .filter((jar) => jar.state === 'due' || jar.state === 'resting')
    .map((jar) => jar.dueOn)
    .toSorted()[0]
  const isToday = waiting !== undefined && waiting <= study.today
  const ofNext = own.pullJars.filter((jar) =>
    isToday
      ? jar.dueOn === study.today || (jar.dueOn < study.today && jar.state !== 'done')
      : jar.dueOn === waiting,
  )
  const counting = ofNext.filter((jar) => jar.state !== 'missed')
  const jarsNext = {
    due: counting.length,
    done: counting.filter((jar) => jar.state === 'done').length,
  }
  return {
    nextPullOn: waiting ?? null,
    isToday,
    jarsNext,
    flags: own.openFlags,
    whoIsNext: whoIsNext(study, own, waiting !== undefined),
  }
}

function whoIsNext(
  study: { startedBy: string; state: string },
  own: { openFlags: number; caseToSign: string | null },
  hasPulls: boolean,
): string {
  if (own.openFlags > 0) {
    return `${study.startedBy}, ${own.openFlags} ${own.openFlags === 1 ? 'flag' : 'flags'}`
  }
  if (own.caseToSign) return `QA signs ${own.caseToSign}`
  if (study.state === 'closed') return 'nobody'
  return hasPulls ? 'Bench pulls' : `${study.startedBy} ends it`
}

export function sorted(rows: LedgerRow[], sort: (typeof studySorts)[number]): LedgerRow[] {
  if (sort === 'code') return rows
  if (sort === 'next') {
    return rows.toSorted((a, b) => (a.nextPullOn ?? '9999').localeCompare(b.nextPullOn ?? '9999'))
  }
  return rows.toSorted(
    (a, b) =>
      ranks.indexOf(b.standing) - ranks.indexOf(a.standing) || (b.worst?.used ?? 0) - (a.worst?.used ?? 0),
  )
}

/** "Two of 18 studies are out, three are leaning". */
export function ledgerHeadline(rows: LedgerRow[], filter: StudyFilter) {
  const count = (standing: Standing) => rows.filter((row) => row.standing === standing).length
  const [out, leaning] = [count('out'), count('leaning')]
  const todays = rows.filter((row) => row.isToday)
  const due = todays.reduce((sum, row) => sum + row.jarsNext.due, 0)
  const done = todays.reduce((sum, row) => sum + row.jarsNext.done, 0)
  return {
    headline: headline(rows.length, out, leaning, filter),
    sentence:
      filter.is === 'closed'
        ? ''
        : due === 0
          ? 'No jar is due today.'
          : `${capital(counted(due, 'jar'))} ${due === 1 ? 'is' : 'are'} due today in ${counted(todays.length, 'study', 'studies')}: ${numberWord(done) === 'no' ? 'none is' : `${numberWord(done)} ${done === 1 ? 'is' : 'are'}`} in${due > done ? `, ${numberWord(due - done)} still to be read` : ''}.`,
  }
}

function headline(total: number, out: number, leaning: number, filter: StudyFilter) {
  const studies = total === 1 ? 'study' : 'studies'
  const kind = filter.is === 'closed' ? 'ended ' : ''
  if (total === 0) {
    return filter.q
      ? [`No ${kind || 'running '}study has ${filter.q}`, '']
      : [`No ${kind || 'running '}study yet`, '']
  }
  if (out > 0) {
    const rest = leaning > 0 ? `, ${numberWord(leaning)} ${leaning === 1 ? 'is' : 'are'} leaning` : ''
    if (total === 1) return ['The one study', ` ${filter.is === 'closed' ? 'that ended ' : ''}is out`]
    return [
      `${capital(numberWord(out))} of ${total}`,
      ` ${kind}${studies} ${out === 1 ? 'is' : 'are'} out${rest}`,
    ]
  }
  if (leaning > 0) {
    if (total === 1) return ['The one study', ' is leaning']
    return [
      `${capital(numberWord(leaning))} of ${total}`,
      ` ${kind}${studies} ${leaning === 1 ? 'is' : 'are'} leaning, none is out`,
    ]
  }
  if (total === 1) return ['The one study', ' is neither out nor leaning']
  return [`None of ${numberWord(total)}`, ` ${kind}${studies} is out or leaning`]
}
