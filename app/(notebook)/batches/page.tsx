import type { Metadata } from 'next'
import { BatchList } from '@/components/batch/batch-list'
import { ListSearch } from '@/components/formula/list-search'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { Tabs } from '@/components/ui/tabs'
import { may } from '@/lib/auth/permissions'
import { listBatches } from '@/lib/batch/queries/list-batches'
import { batchListQuery, batchStates } from '@/lib/batch/schema'
import { page } from '@/lib/http/page'

export const permission = 'batch.read'
export const metadata: Metadata = { title: 'Batches' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function BatchesPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = batchListQuery.parse(await searchParams)
  const batches = await listBatches(db, actor, query)
  const count = (state: string) => batches.filter((batch) => batch.state === state).length
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' })
  return (
    <>
      <Heading
        crumb={query.q ? `Batches with ${query.q}` : 'Batches'}
        headline={
          <>
            <b>{count('making') || 'No'}</b> {count('making') === 1 ? 'batch is' : 'batches are'} being made,{' '}
            <b>{count('resting') || 'none'}</b> at rest
          </>
        }
        sentence={`${count('released')} of these are released; a study starts on a released batch.`}
        acts={
          may(actor, 'batch.write') ? <LinkButton href="/batches/new">Size a batch</LinkButton> : undefined
        }
      />
      <div className="mt-6 flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
        <ListSearch
          action="/batches"
          label="Find a batch"
          placeholder="Code or formula"
          q={query.q}
          kept={{ state: query.state, sort: query.sort, order: query.order }}
        />
        <Tabs
          label="By state"
          hasLine={false}
          tabs={(['all', ...batchStates] as const).map((state) => ({
            href: `/batches?${new URLSearchParams({ ...(query.q ? { q: query.q } : {}), state })}`,
            label: state,
            isHere: state === query.state,
          }))}
        />
      </div>
      <div className="mt-4">
        <BatchList batches={batches} query={query} day={(instant) => day.format(new Date(instant))} />
      </div>
    </>
  )
}
