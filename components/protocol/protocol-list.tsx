'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import type { ProtocolRow } from '@/lib/protocol/queries'
import { jarsOfPlan, stationName } from '@/lib/protocol/rules/plan'
import { capital, counted, listed, numberWord } from '@/lib/study/rules/words'
import { span } from '../study/study-heading'
import { TakeReadyMade } from './take-ready-made'

/** The lab's protocols, each with what it takes of a batch. */
export function ProtocolList({ protocols, mayWrite }: { protocols: ProtocolRow[]; mayWrite: boolean }) {
  const router = useRouter()
  const running = protocols.filter((one) => Number(one.studies) > 0).length
  const take = mayWrite ? (
    <TakeReadyMade kind="primary" onTaken={(_, code) => router.push(`/protocols/${code}`)} />
  ) : undefined
  return (
    <>
      <Heading
        crumb="Protocols"
        headline={
          protocols.length === 0 ? (
            'No protocol is here yet'
          ) : (
            <>
              <b>{capital(counted(protocols.length, 'protocol'))}</b>
              {running === 0
                ? ', none followed yet'
                : `, ${running === protocols.length ? 'all' : numberWord(running)} followed by ${running === 1 ? 'a study' : 'studies'}`}
            </>
          )
        }
        sentence="A protocol says which jars stand where, when each is pulled, and how far a reading may move."
        acts={protocols.length > 0 ? take : undefined}
      />
      <div className="mt-6">
        <Ledger
          caption="Protocols"
          rows={protocols}
          rowKey={(row) => row.id}
          empty={
            <Empty
              title="Begin with a ready-made one"
              sentence="A screen of 12 weeks, a long-term study, freeze-thaw or transport: edit it to your own ways."
              act={take}
            />
          }
          columns={[
            {
              key: 'code',
              title: 'code',
              width: '80px',
              cell: (row) => (
                <Link href={`/protocols/${row.code}`} className="font-650 underline-offset-4 hover:underline">
                  {row.code}
                </Link>
              ),
            },
            { key: 'name', title: 'name', cell: (row) => row.name },
            {
              key: 'stations',
              title: 'stations',
              from: 'desk',
              cell: (row) => listed(row.plan.stations.map(stationName)),
            },
            { key: 'span', title: 'runs', from: 'tablet', cell: (row) => span(row.plan.endWeeks) },
            {
              key: 'grams',
              title: 'takes of a batch',
              from: 'tablet',
              align: 'right',
              cell: (row) => {
                const { jars, grams } = jarsOfPlan(row.plan, 1)
                return `${jars} jars, ${Math.ceil(grams)} g`
              },
            },
            {
              key: 'state',
              title: 'stands at',
              cell: (row) =>
                `version ${row.number}, ${row.state === 'locked' ? 'locked, not approved' : row.state}`,
            },
            { key: 'studies', title: 'studies', align: 'right', cell: (row) => row.studies },
          ]}
        />
      </div>
    </>
  )
}
