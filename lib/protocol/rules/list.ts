import { choice, day, describeList } from '@/lib/list/schema'
import { listed } from '@/lib/study/rules/words'
import type { ProtocolRow } from '../queries'
import { jarsOfPlan, stationName } from './plan'

export const protocolList = describeList<ProtocolRow>()({
  name: 'protocols',
  sort: 'code',
  columns: [
    { key: 'code', title: 'code', sort: 'text', value: (row) => row.code },
    { key: 'name', title: 'name', sort: 'text', value: (row) => row.name },
    { key: 'stations', title: 'stations', value: (row) => listed(row.plan.stations.map(stationName)) },
    { key: 'span', title: 'runs, weeks', kind: 'number', sort: 'number', value: (row) => row.plan.endWeeks },
    { key: 'jars', title: 'jars a batch', kind: 'number', value: (row) => jarsOfPlan(row.plan, 1).jars },
    {
      key: 'grams',
      title: 'takes of a batch, g',
      kind: 'number',
      value: (row) => Math.ceil(jarsOfPlan(row.plan, 1).grams),
    },
    {
      key: 'state',
      title: 'stands at',
      sort: 'text',
      value: (row) => `version ${row.number}, ${row.state === 'locked' ? 'locked, not approved' : row.state}`,
    },
    { key: 'studies', title: 'studies', kind: 'number', sort: 'number', value: (row) => row.studies ?? 0 },
    { key: 'by', title: 'written by', sort: 'text', isExtra: true, value: (row) => row.madeBy },
    {
      key: 'begun',
      title: 'begun',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (row) => row.createdAt,
    },
  ],
  filters: {
    state: choice('Stands at', ['draft', 'locked', 'approved']),
    use: choice('Studies', ['followed', 'not followed']),
    by: choice('By'),
    from: day('Begun from'),
    to: day('to'),
  },
})
