import type { Metadata } from 'next'
import { BatchList } from '@/components/batch/batch-list'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { may } from '@/lib/auth/permissions'
import { listBatches } from '@/lib/batch/queries/list-batches'
import { batchList } from '@/lib/batch/rules/list'
import { batchStates } from '@/lib/batch/schema'
import { grouped } from '@/lib/number/rules'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listAddress } from '@/lib/list/rules'

export const permission = 'batch.read'
export const metadata: Metadata = { title: 'Batches' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function BatchesPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = batchList.query.parse(await searchParams)
  const found = await listBatches(db, actor, query)
  const { timeZone } = await getLab(db)
  const { making, resting, released } = found.counts
  return (
    <>
      <Heading
        crumb={query.q ? `Batches with ${query.q}` : 'Batches'}
        headline={
          <>
            <b>{making ? grouped(making, 0) : 'No'}</b> {making === 1 ? 'batch is' : 'batches are'} being
            made, <b>{resting ? grouped(resting, 0) : 'none'}</b> at rest
          </>
        }
        sentence={`${grouped(released, 0)} of all ${released === 1 ? 'is' : 'are'} released; a study starts on a released batch.`}
        tabsLabel="By state"
        tabs={['', ...batchStates].map((state) => ({
          href: listAddress('/batches', batchList, query, { filters: { state } }),
          label: state || 'all',
          isHere: state === query.filters.state,
        }))}
        acts={
          may(actor, 'batch.write') ? <LinkButton href="/batches/new">Size a batch</LinkButton> : undefined
        }
      />
      <div className="mt-5">
        <BatchList page={found} query={query} timeZone={timeZone} />
      </div>
    </>
  )
}
