import { choice, describeList } from '@/lib/list/schema'
import type { InstrumentRow } from '../queries/list'

export const instrumentList = describeList<InstrumentRow>()({
  name: 'instruments',
  sort: 'code',
  columns: [
    { key: 'code', title: 'code', sort: 'text', value: (row) => row.code },
    { key: 'name', title: 'name', sort: 'text', value: (row) => row.name },
    { key: 'kind', title: 'kind', sort: 'text', value: (row) => row.kind },
    { key: 'result', title: 'last calibration', sort: 'text', value: (row) => row.result ?? 'none yet' },
    { key: 'sentence', title: 'what it showed', value: (row) => row.detail?.sentence ?? '' },
    { key: 'due', title: 'due', kind: 'day', sort: 'day', value: (row) => row.dueOn },
    {
      key: 'calibrated',
      title: 'calibrated',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (row) => row.calibratedAt,
    },
    {
      key: 'use',
      title: 'in use',
      isExtra: true,
      value: (row) => (row.isActive ? 'yes' : 'out of use'),
    },
  ],
  filters: {
    kind: choice('Kind', ['meter', 'viscometer', 'balance']),
    result: choice('Calibration', ['good', 'doubtful', 'none yet']),
    use: choice('Use', ['in use', 'out of use']),
  },
})
