'use client'

import Link from 'next/link'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import type { BatchesPage, BatchRow } from '@/lib/batch/queries/list-batches'
import { batchList } from '@/lib/batch/rules/list'
import { grouped } from '@/lib/number/rules'
import { isNarrowed } from '@/lib/list/rules'
import type { ListQuery } from '@/lib/list/schema'

type Props = { page: BatchesPage; query: ListQuery; timeZone: string }

export function BatchList({ page, query, timeZone }: Props) {
  return (
    <>
      <ListTools
        list={batchList}
        path="/batches"
        query={query}
        choices={page.choices}
        without={['state']}
        searchLabel="Find a batch"
        placeholder="Code or formula"
        total={page.total}
      />
      <div className="mt-3">
        <ListLedger
          list={batchList}
          path="/batches"
          query={query}
          page={page}
          caption="Batches"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          isQuiet={(row) => row.state === 'rejected'}
          cells={cells}
          empty={<NoBatch query={query} />}
        />
      </div>
    </>
  )
}

const cells: Parameters<typeof ListLedger<BatchRow>>[0]['cells'] = {
  code: {
    width: '110px',
    cell: (row) => (
      <Link href={`/batches/${row.code}`} className="font-650 underline-offset-4 hover:underline">
        {row.code}
      </Link>
    ),
  },
  size: { from: 'tablet', cell: (row) => grouped(row.sizeG, 0) },
  yield: { from: 'tablet', cell: (row) => (row.yieldG === null ? '' : grouped(row.yieldG, 0)) },
  made: { from: 'tablet' },
  studies: { from: 'desk' },
  next: { from: 'tablet' },
}

function NoBatch({ query }: { query: ListQuery }) {
  if (isNarrowed(batchList, query)) {
    return (
      <Empty
        title={
          query.q ? `No batch has ${query.q}.` : `No batch is ${query.filters['state'] || 'of that kind'}.`
        }
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
