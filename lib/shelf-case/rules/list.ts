import { choice, day, describeList } from '@/lib/list/schema'
import { dayText } from '@/lib/report/rules'
import type { CaseRow } from '../queries/list'
import { caseStates } from '../schema'

export const caseList = describeList<CaseRow>()({
  name: 'cases',
  sort: 'code',
  order: 'desc',
  columns: [
    { key: 'code', title: 'case', sort: 'text', value: (row) => row.code },
    { key: 'study', title: 'study', sort: 'text', value: (row) => `${row.studyCode} ${row.studyTitle}` },
    { key: 'months', title: 'months', kind: 'number', sort: 'number', value: (row) => row.proposedMonths },
    { key: 'storage', title: 'stored', value: (row) => row.storageStatement },
    { key: 'kind', title: 'kind', sort: 'text', value: (row) => row.kind },
    { key: 'state', title: 'stands at', sort: 'text', value: (row) => row.state },
    { key: 'next', title: 'who is next', value: whoIsNext },
    { key: 'client', title: 'client', sort: 'text', isExtra: true, value: (row) => row.clientName },
    {
      key: 'putForward',
      title: 'put forward',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (row) => row.putForwardAt,
    },
    { key: 'by', title: 'put forward by', sort: 'text', isExtra: true, value: (row) => row.putForwardBy },
    {
      key: 'signed',
      title: 'signed',
      kind: 'instant',
      sort: 'instant',
      isExtra: true,
      value: (row) => row.signedAt,
    },
  ],
  filters: {
    state: choice('State', caseStates),
    kind: choice('Kind', ['real time', 'provisional']),
    client: choice('Client'),
    by: choice('By'),
    from: day('Put forward from'),
    to: day('to'),
  },
})

function whoIsNext(row: CaseRow): string {
  if (row.state === 'drafting') return 'formulator puts it forward'
  if (row.state === 'put forward') return 'QA signs or sends back'
  if (row.state === 'signed' && row.signedAt) return `signed ${dayText(row.signedAt)}`
  return 'nobody'
}
