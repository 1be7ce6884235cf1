import type { SeriesFinding, Standing } from '@/lib/science/series'
import type { ListQuery } from '@/lib/list/schema'
import { worstOf, type CellState, type Posture } from './cells'
import { capital, counted, numberWord } from './words'

export type LedgerRow = {
  id: string
  code: string
  title: string
  state: string
  batches: string[]
  /** What stands beside them for comparison. */
  references: string[]
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
    /** Read beyond its band, or separation has begun, and nobody has settled it yet. */
    isPending: boolean
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

type Pending = { studyStationId: string | null; batchId: string; attribute: string; rule: string }

/**
 * The shelf to look at first: the worst standing, then what was read beyond its band and waits for its repeat,
 * then the most of its band used; else the hottest one.
 */
export function worstShelf(series: Series[], stations: Station[], flags: Pending[]) {
  const isPending = (one: Series) =>
    flags.some(
      (flag) =>
        (flag.rule === 'out' || flag.rule === 'onset') &&
        flag.studyStationId === one.studyStationId &&
        flag.batchId === one.batchId &&
        flag.attribute === one.attribute,
    )
  const worst = series.toSorted(
    (a, b) =>
      ranks.indexOf(b.standing) - ranks.indexOf(a.standing) ||
      Number(isPending(b)) - Number(isPending(a)) ||
      (b.used ?? 0) - (a.used ?? 0),
  )[0]
  const hottest = stations.toSorted((a, b) => (b.temperatureC ?? -1000) - (a.temperatureC ?? -1000))[0]
  const isTold = worst !== undefined && (worst.standing !== 'untold' || isPending(worst))
  return {
    standing: worstOf(series.map((one) => one.standing)),
    series: isTold ? worst : null,
    station: (isTold ? stations.find((one) => one.id === worst.studyStationId) : hottest) ?? null,
    isPending: isTold && worst.standing !== 'out' && isPending(worst),
  }
}

/** Who is next: whoever answers flags, signs, ends the study; otherwise the Bench pulls. */
export function nextOne(
  study: { today: string; startedBy: string; state: string },
  own: {
    pullJars: { dueOn: string; windowTo: string; state: string }[]
    flags: Pending[]
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
    flags: own.flags.length,
    whoIsNext: whoIsNext(study, own.flags.length, own.caseToSign, waiting !== undefined),
  }
}

function whoIsNext(
  study: { startedBy: string; state: string },
  flags: number,
  caseToSign: string | null,
  hasPulls: boolean,
): string {
  if (flags > 0) return `${study.startedBy}, ${flags} ${flags === 1 ? 'flag' : 'flags'}`
  if (caseToSign) return `QA signs ${caseToSign}`
  if (study.state === 'closed') return 'nobody'
  return hasPulls ? 'Bench pulls' : `${study.startedBy} ends it`
}

/** Counts of all that is searched for, whatever page is shown. */
export type LedgerSummary = {
  total: number
  out: number
  leaning: number
  due: number
  done: number
  studiesToday: number
}

/** "Two of 18 studies are out, three are leaning". */
export function ledgerHeadline(summary: LedgerSummary, query: ListQuery) {
  const { total, out, leaning, due, done, studiesToday } = summary
  const isClosed = query.filters['is'] === 'closed'
  return {
    headline: headline(total, out, leaning, { q: query.q, isClosed }),
    sentence: isClosed
      ? ''
      : due === 0
        ? 'No jar is due today.'
        : `${capital(counted(due, 'jar'))} ${due === 1 ? 'is' : 'are'} due today in ${counted(studiesToday, 'study', 'studies')}: ${numberWord(done) === 'no' ? 'none is' : `${numberWord(done)} ${done === 1 ? 'is' : 'are'}`} in${due > done ? `, ${numberWord(due - done)} still to be read` : ''}.`,
  }
}

function headline(total: number, out: number, leaning: number, filter: { q: string; isClosed: boolean }) {
  const studies = total === 1 ? 'study' : 'studies'
  const kind = filter.isClosed ? 'ended ' : ''
  if (total === 0) {
    return filter.q
      ? [`No ${kind || 'running '}study has ${filter.q}`, '']
      : [`No ${kind || 'running '}study yet`, '']
  }
  if (out > 0) {
    const rest = leaning > 0 ? `, ${numberWord(leaning)} ${leaning === 1 ? 'is' : 'are'} leaning` : ''
    if (total === 1) return ['The one study', ` ${filter.isClosed ? 'that ended ' : ''}is out`]
    return [
      `${capital(numberWord(out))} of ${numberWord(total)}`,
      ` ${kind}${studies} ${out === 1 ? 'is' : 'are'} out${rest}`,
    ]
  }
  if (leaning > 0) {
    if (total === 1) return ['The one study', ' is leaning']
    return [
      `${capital(numberWord(leaning))} of ${numberWord(total)}`,
      ` ${kind}${studies} ${leaning === 1 ? 'is' : 'are'} leaning, none is out`,
    ]
  }
  if (total === 1) return ['The one study', ' is neither out nor leaning']
  return [`None of ${numberWord(total)}`, ` ${kind}${studies} is out or leaning`]
}
