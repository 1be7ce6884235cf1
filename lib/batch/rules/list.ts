import { emulsionTypes } from '@/lib/formula/schema'
import { choice, day, describeList } from '@/lib/list/schema'
import type { BatchRow } from '../queries/list-batches'
import { batchStates } from '../schema'

export const batchList = describeList<BatchRow>()({
  name: 'batches',
  sort: 'made',
  order: 'desc',
  columns: [
    { key: 'code', title: 'batch', sort: 'text', value: (row) => row.code },
    {
      key: 'formula',
      title: 'formula',
      sort: 'text',
      value: (row) =>
        row.isReference
          ? `${row.formulaName}, lot ${row.productLot}, a reference product`
          : `${row.formulaName}, version ${row.versionNumber}`,
    },
    { key: 'size', title: 'size, g', kind: 'number', sort: 'number', value: (row) => row.sizeG },
    { key: 'yield', title: 'yield, g', kind: 'number', sort: 'number', value: (row) => row.yieldG },
    { key: 'made', title: 'made', kind: 'instant', sort: 'instant', value: (row) => row.madeAt },
    { key: 'studies', title: 'in study', value: (row) => row.studies.map((study) => study.code).join(', ') },
    { key: 'state', title: 'stands at', sort: 'text', value: (row) => row.state },
    { key: 'next', title: 'who is next', value: whoIsNext },
    { key: 'type', title: 'emulsion type', sort: 'text', isExtra: true, value: (row) => row.emulsionType },
    { key: 'found', title: 'type found', isExtra: true, value: (row) => row.emulsionTypeFound },
    { key: 'client', title: 'client', sort: 'text', isExtra: true, value: (row) => row.clientName },
    { key: 'by', title: 'begun by', sort: 'text', isExtra: true, value: (row) => row.createdByName },
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
    state: choice('State', batchStates),
    type: choice('Type', emulsionTypes),
    client: choice('Client'),
    by: choice('By'),
    from: day('Made from'),
    to: day('to'),
  },
})

export function whoIsNext(row: BatchRow): string {
  if (row.state === 'making') {
    const left = row.lines - row.linesWeighed
    return `${row.createdBy}: ${left ? `${left} to weigh` : 'its steps, then the yield'}`
  }
  if (row.state === 'resting')
    return row.emulsionTypeFound ? 'formulator decides' : 'formulator tests the type'
  return row.state === 'released' && !row.studies.length ? 'a study can start' : 'nobody'
}
