'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import type { ListQuery } from '@/lib/list/schema'
import { grouped } from '@/lib/number/rules'
import type { ProtocolRow, ProtocolsPage } from '@/lib/protocol/queries'
import { protocolList } from '@/lib/protocol/rules/list'
import { jarsOfPlan } from '@/lib/protocol/rules/plan'
import { capital, counted, numberWord } from '@/lib/study/rules/words'
import { span } from '../study/study-heading'
import { TakeReadyMade } from './take-ready-made'

type Props = { page: ProtocolsPage; query: ListQuery; mayWrite: boolean; timeZone: string }

/** The lab's protocols, each with what it takes of a batch. */
export function ProtocolList({ page, query, mayWrite, timeZone }: Props) {
  const router = useRouter()
  const { all, followed } = page.counts
  const take = mayWrite ? (
    <TakeReadyMade kind="primary" onTaken={(_, code) => router.push(`/protocols/${code}`)} />
  ) : undefined
  return (
    <>
      <Heading
        crumb="Protocols"
        headline={
          all === 0 ? (
            'No protocol is here yet'
          ) : (
            <>
              <b>{capital(counted(all, 'protocol'))}</b>
              {followed === 0
                ? ', none followed yet'
                : `, ${followed === all ? 'all' : numberWord(followed)} followed by ${followed === 1 ? 'a study' : 'studies'}`}
            </>
          )
        }
        sentence="A protocol says which jars stand where, when each is pulled, and how far a reading may move."
        acts={all > 0 ? take : undefined}
      />
      <div className="mt-5">
        <ListTools
          list={protocolList}
          path="/protocols"
          query={query}
          choices={page.choices}
          searchLabel="Find a protocol"
          placeholder="Code or name"
          total={page.total}
        />
      </div>
      <div className="mt-3">
        <ListLedger
          list={protocolList}
          path="/protocols"
          query={query}
          page={page}
          caption="Protocols"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          cells={cells}
          empty={
            all > 0 ? (
              <Empty
                title={query.q ? `No protocol has ${query.q}.` : 'No protocol is of that kind.'}
                act={<LinkButton href="/protocols">Show all protocols</LinkButton>}
              />
            ) : (
              <Empty
                title="Begin with a ready-made one"
                sentence="A screen of 12 weeks, a long-term study, freeze-thaw or transport: edit it to your own ways."
                act={take}
              />
            )
          }
        />
      </div>
    </>
  )
}

const cells: Parameters<typeof ListLedger<ProtocolRow>>[0]['cells'] = {
  code: {
    width: '80px',
    cell: (row) => (
      <Link href={`/protocols/${row.code}`} className="font-650 underline-offset-4 hover:underline">
        {row.code}
      </Link>
    ),
  },
  stations: { from: 'desk' },
  span: { from: 'tablet', cell: (row) => span(row.plan.endWeeks) },
  jars: { from: 'tablet' },
  grams: { from: 'tablet', cell: (row) => grouped(jarsOfPlan(row.plan, 1).grams, 0) },
}
