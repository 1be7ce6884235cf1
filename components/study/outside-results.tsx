'use client'

import { useState } from 'react'
import useSWR from 'swr'
import { Button } from '@/components/ui/button'
import { ErrorNote } from '@/components/ui/error-note'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { fetcher } from '@/lib/http/fetcher'
import type { OutsideResult } from '@/lib/outside/queries'
import { outsideKeys } from '@/lib/outside/keys'
import { dayText } from '@/lib/report/rules'
import { capital } from '@/lib/study/rules/words'
import { OutsideForm } from './outside-form'

type Props = { code: string; batches: string[]; mayLog: boolean }

/** What outside laboratories reported, each with its document; a correction stands beside what it corrects. */
export function OutsideResults({ code, batches, mayLog }: Props) {
  const { data, error, mutate } = useSWR<OutsideResult[]>(outsideKeys.ofStudy(code), fetcher)
  const [adding, setAdding] = useState<{ old: OutsideResult | null } | null>(null)
  const rows = data ?? []
  return (
    <div className="mt-10">
      <Section
        title="From outside laboratories"
        sentence="Microbiology and preservative efficacy belong to qualified laboratories. What they report supports a case; nothing is computed from it."
      >
        <ErrorNote error={error} />
        {rows.length === 0 ? (
          <p className="text-15 text-soft">Nothing was reported yet.</p>
        ) : (
          <Ledger
            caption={`Results of outside laboratories for ${code}`}
            rows={rows}
            rowKey={(row) => row.id}
            columns={[
              {
                key: 'test',
                title: 'test',
                cell: (row) => <Struck row={row}>{`${capital(row.what)}: ${row.test}`}</Struck>,
              },
              {
                key: 'outcome',
                title: 'outcome',
                cell: (row) => (
                  <Struck row={row}>
                    <b className={row.outcome === 'fail' && !row.isSuperseded ? 'text-alarm' : ''}>
                      {row.outcome}
                    </b>
                    {row.value ? `, ${row.value}` : ''}
                  </Struck>
                ),
              },
              {
                key: 'of',
                title: 'of',
                from: 'tablet',
                cell: (row) =>
                  `${row.batch ?? 'all batches'}, ${row.timeWeeks === null ? 'the whole study' : `week ${row.timeWeeks}`}`,
              },
              {
                key: 'lab',
                title: 'laboratory and report',
                cell: (row) => (
                  <>
                    {row.labName},{' '}
                    <a className="underline underline-offset-4" href={outsideKeys.document(row.id)}>
                      report {row.reportNumber}
                    </a>{' '}
                    of {dayText(row.reportedOn)}
                    {row.reason ? (
                      <span className="block text-13 text-soft">because: {row.reason}</span>
                    ) : null}
                  </>
                ),
              },
              {
                key: 'by',
                title: 'entered',
                from: 'tablet',
                cell: (row) => `${row.initials}, ${dayText(row.recordedAt)}`,
              },
              {
                key: 'acts',
                title: '',
                cell: (row) =>
                  mayLog && !row.isSuperseded ? (
                    <Button onClick={() => setAdding({ old: row })}>Correct</Button>
                  ) : null,
              },
            ]}
          />
        )}
        {mayLog ? (
          <Button className="mt-3" onClick={() => setAdding({ old: null })}>
            Enter a report
          </Button>
        ) : null}
      </Section>
      {adding ? (
        <OutsideForm
          code={code}
          batches={batches}
          old={adding.old}
          onClose={() => setAdding(null)}
          onDone={() => {
            setAdding(null)
            void mutate()
          }}
        />
      ) : null}
    </div>
  )
}

function Struck({ row, children }: { row: OutsideResult; children: React.ReactNode }) {
  return <span className={row.isSuperseded ? 'text-soft line-through' : ''}>{children}</span>
}
