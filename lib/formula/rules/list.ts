import { choice, day, describeList } from '@/lib/list/schema'
import type { FormulaRow } from '../queries/list-formulas'
import { emulsionTypes } from '../schema'

export const packings = ['past the closest', 'below it'] as const

export const formulaList = describeList<FormulaRow>()({
  name: 'formulas',
  sort: 'code',
  columns: [
    { key: 'code', title: 'code', sort: 'text', value: (row) => row.code },
    { key: 'name', title: 'name', sort: 'text', value: (row) => row.name },
    { key: 'emulsionType', title: 'emulsion type', sort: 'text', value: (row) => row.emulsionType },
    {
      key: 'internal',
      title: 'internal, % v/v',
      kind: 'number',
      sort: 'number',
      value: (row) => row.internalVolumePercent && Number(row.internalVolumePercent.toFixed(2)),
    },
    {
      key: 'batches',
      title: 'batches',
      sort: 'number',
      value: (row) => row.batches.map((batch) => batch.code).join(', '),
    },
    {
      key: 'state',
      title: 'stands at',
      sort: 'text',
      value: (row) => `version ${row.versionNumber}, ${row.state}`,
    },
    { key: 'client', title: 'client', sort: 'text', isExtra: true, value: (row) => row.clientName },
    {
      key: 'missing',
      title: 'missing to 100 %',
      kind: 'number',
      isExtra: true,
      value: (row) => (row.missingThousandths ?? 0) / 1000,
    },
    {
      key: 'cost',
      title: 'cost per kg',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (row) => (row.costCentsPerKg === null ? null : row.costCentsPerKg / 100),
    },
    { key: 'by', title: 'written by', sort: 'text', isExtra: true, value: (row) => row.createdBy },
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
    type: choice('Type', emulsionTypes),
    packing: choice('Packing', packings),
    state: choice('Stands at', ['draft', 'locked']),
    client: choice('Client'),
    by: choice('By'),
    from: day('Begun from'),
    to: day('to'),
  },
})
