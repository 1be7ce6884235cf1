import { choice, day, describeList } from '@/lib/list/schema'
import { studyStandings } from '../schema'
import { addDays, spokenDay } from './calendar'
import { inSentence } from './finding'
import type { LedgerRow } from './ledger'
import { counted } from './words'

export const studyList = describeList<LedgerRow>()({
  name: 'studies',
  sort: 'standing',
  order: 'desc',
  columns: [
    { key: 'code', title: 'study', sort: 'text', value: (row) => row.code },
    {
      key: 'batch',
      title: 'batch and formula',
      value: (row) => `${batchNames(row.batches)} ${row.formulaName}`,
    },
    { key: 'client', title: 'client', sort: 'text', value: (row) => row.clientName },
    {
      key: 'shelf',
      title: 'worst shelf, each to its own time',
      value: (row) =>
        row.station?.temperatureC === null || !row.station ? '' : `${row.station.temperatureC} °C`,
    },
    { key: 'standing', title: 'standing', sort: 'number', value: (row) => row.standing },
    { key: 'next', title: 'next pull', kind: 'day', sort: 'day', value: (row) => row.nextPullOn },
    { key: 'who', title: 'who is next', value: (row) => row.whoIsNext },
    { key: 'title', title: 'title', sort: 'text', isExtra: true, value: (row) => row.title },
    { key: 'why', title: 'what gives the standing', isExtra: true, value: standingNote },
    {
      key: 'started',
      title: 'begun',
      kind: 'day',
      sort: 'day',
      isExtra: true,
      value: (row) => row.startedOn,
    },
    {
      key: 'weeks',
      title: 'weeks',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (row) => row.endWeeks,
    },
    { key: 'flags', title: 'open flags', kind: 'number', isExtra: true, value: (row) => row.flags },
  ],
  filters: {
    is: choice('State', ['running', 'closed'], 'running'),
    standing: choice('Standing', studyStandings),
    client: choice('Client'),
    station: choice('Station'),
    by: choice('By'),
    from: day('Begun from'),
    to: day('to'),
  },
})

export function batchNames(codes: string[]): string {
  return codes.length > 2 ? `${codes[0]} to ${codes.at(-1)}` : codes.join(' and ')
}

/** Which attribute gives the standing, and how far it has come. */
export function standingNote({ standing, worst, timePoints, startedOn }: LedgerRow): string {
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
