import Link from 'next/link'
import { Empty } from '@/components/ui/empty'
import { Ledger, type LedgerColumn } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import type { BatchRow } from '@/lib/batch/queries/list-batches'
import type { BatchListQuery } from '@/lib/batch/schema'
import { grouped } from '@/lib/number/rules'

type Props = { batches: BatchRow[]; query: BatchListQuery; day: (instant: string) => string }

export function BatchList({ batches, query, day }: Props) {
  return (
    <Ledger
      caption="Batches"
      rows={batches}
      rowKey={(row) => row.id}
      isQuiet={(row) => row.state === 'rejected'}
      empty={<NoBatch query={query} />}
      columns={columnsOf(day).map(({ isSorted, ...column }) => ({
        ...column,
        sort: isSorted ? sortOf(column.key, query) : undefined,
      }))}
    />
  )
}

function columnsOf(day: Props['day']): (LedgerColumn<BatchRow> & { isSorted?: boolean })[] {
  return [
    {
      key: 'code',
      title: 'batch',
      width: '110px',
      isSorted: true,
      cell: (row) => (
        <Link href={`/batches/${row.code}`} className="font-650 underline-offset-4 hover:underline">
          {row.code}
        </Link>
      ),
    },
    {
      key: 'formula',
      title: 'formula',
      isSorted: true,
      cell: (row) => `${row.formulaName}, version ${row.versionNumber}`,
    },
    {
      key: 'size',
      title: 'size, g',
      align: 'right',
      from: 'tablet',
      isSorted: true,
      cell: (row) => grouped(row.sizeG, 0),
    },
    {
      key: 'yield',
      title: 'yield, g',
      align: 'right',
      from: 'tablet',
      isSorted: true,
      cell: (row) => (row.yieldG === null ? '' : grouped(row.yieldG, 0)),
    },
    {
      key: 'made',
      title: 'made',
      from: 'tablet',
      isSorted: true,
      cell: (row) => (row.madeAt ? day(row.madeAt) : ''),
    },
    {
      key: 'studies',
      title: 'in study',
      from: 'desk',
      cell: (row) => row.studies.map((study) => study.code).join(', '),
    },
    { key: 'state', title: 'stands at', isSorted: true, cell: (row) => row.state },
    { key: 'next', title: 'who is next', from: 'tablet', cell: whoIsNext },
  ]
}

function whoIsNext(row: BatchRow): string {
  if (row.state === 'making') {
    const left = row.lines - row.linesWeighed
    return `${row.createdBy}: ${left ? `${left} to weigh` : 'its steps, then the yield'}`
  }
  if (row.state === 'resting')
    return row.emulsionTypeFound ? 'formulator decides' : 'formulator tests the type'
  return row.state === 'released' && !row.studies.length ? 'a study can start' : 'nobody'
}

function sortOf(key: string, query: BatchListQuery) {
  const isNow = query.sort === key
  const order = isNow && query.order === 'asc' ? 'desc' : 'asc'
  const kept = {
    ...(query.q ? { q: query.q } : {}),
    ...(query.state === 'all' ? {} : { state: query.state }),
  }
  return {
    href: `/batches?${new URLSearchParams({ ...kept, sort: key, order })}`,
    now: isNow ? (query.order === 'asc' ? ('up' as const) : ('down' as const)) : undefined,
  }
}

function NoBatch({ query }: { query: BatchListQuery }) {
  if (query.q || query.state !== 'all') {
    return (
      <Empty
        title={query.q ? `No batch has ${query.q}.` : `No batch is ${query.state}.`}
        sentence="The search looks in batch codes and formula names."
        act={<LinkButton href="/batches">Show all batches</LinkButton>}
      />
    )
  }
  return (
    <Empty
      title="No batch is here yet"
      sentence="A batch is made from a formula, on its own page."
      act={<LinkButton href="/formulas">Choose a formula</LinkButton>}
    />
  )
}
