import { attributeName } from '@/lib/reading/schema/attributes'
import { choice, day, describeList } from '@/lib/list/schema'
import { degrees } from '@/lib/study/rules/finding'
import type { FlagLine } from '../queries/list'
import { flagStates } from '../schema'
import { needsQuality } from './closing'

export const flagList = describeList<FlagLine>()({
  name: 'flags',
  sort: 'level',
  columns: [
    { key: 'number', title: 'flag', kind: 'number', sort: 'number', value: (flag) => flag.number },
    { key: 'sentence', title: 'what it says', value: (flag) => flag.sentence },
    { key: 'study', title: 'study', sort: 'text', value: (flag) => `${flag.studyCode} ${flag.batchCode}` },
    { key: 'station', title: 'station', sort: 'number', value: stationText },
    { key: 'raised', title: 'raised', kind: 'instant', sort: 'instant', value: (flag) => flag.raisedAt },
    { key: 'level', title: 'level', sort: 'number', value: (flag) => flag.level },
    { key: 'next', title: 'who is next', value: (flag) => nextWords(flag) },
    {
      key: 'attribute',
      title: 'attribute',
      sort: 'text',
      isExtra: true,
      value: (flag) => attributeName(flag.attribute),
    },
    { key: 'state', title: 'state', isExtra: true, value: (flag) => flag.state },
    { key: 'cause', title: 'cause', isExtra: true, value: (flag) => flag.cause },
    { key: 'why', title: 'why', isExtra: true, value: (flag) => flag.why },
    { key: 'action', title: 'what is done', isExtra: true, value: (flag) => flag.action },
    {
      key: 'answered',
      title: 'answered',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (flag) => flag.answeredAt,
    },
    { key: 'answeredBy', title: 'answered by', isExtra: true, value: (flag) => flag.answeredBy },
    {
      key: 'closed',
      title: 'closed',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (flag) => flag.closedAt,
    },
    { key: 'closingNote', title: 'closing note', isExtra: true, value: (flag) => flag.closingNote },
  ],
  filters: {
    state: choice('State', flagStates, 'open'),
    study: choice('Study'),
    level: choice('Level', ['out', 'leaning', 'flag', 'doubt']),
    station: choice('Station'),
    from: day('Raised from'),
    to: day('to'),
  },
})

export function stationText(flag: {
  temperatureC: number | null
  isFreezeThaw: boolean | null
  stationName: string | null
}): string {
  if (flag.isFreezeThaw) return 'freeze-thaw'
  if (flag.temperatureC !== null) return degrees(flag.temperatureC)
  return flag.stationName ?? 'every station'
}

/** Who has the next word about a flag. */
export function nextWords(
  flag: Pick<FlagLine, 'state' | 'level' | 'voice' | 'closedBy' | 'answeredBy'>,
): string {
  if (flag.state === 'closed') return flag.answeredBy ? `closed by ${flag.closedBy}` : 'closed by itself'
  if (flag.state === 'answered') return 'QA closes it'
  if (flag.level === 'doubt') return 'a repeat, or the formulator'
  return needsQuality(flag) ? 'formulator, then QA' : 'formulator answers'
}
