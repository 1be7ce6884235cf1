'use client'

import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { ErrorNote } from '@/components/ui/error-note'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { send } from '@/lib/http/fetcher'
import type { LotRow } from '@/lib/lot/queries'
import { goodUntil, lotDoubt } from '@/lib/lot/rules'
import { lotKeys } from '@/lib/lot/keys'
import { spokenDay } from '@/lib/study/rules/calendar'
import { LotDialog } from './lot-dialog'

type Props = { lots: LotRow[]; today: string; mayKeep: boolean; onDone: () => void }

/** Bottles of buffer and check fluid: what their certificate says, when opened, until when they are good. */
export function LotsPart({ lots, today, mayKeep, onDone }: Props) {
  const [isAdding, setAdding] = useState(false)
  const [error, setError] = useState<unknown>(null)

  async function change(lot: LotRow, fields: { openedOn: string | null; isUsedUp: boolean }) {
    setError(null)
    try {
      await send(lotKeys.one(lot.id), 'PUT', { version: lot.version, ...fields })
      onDone()
    } catch (refused) {
      setError(refused)
    }
  }

  return (
    <Section
      title="Buffers and check fluids"
      sentence="A lot that has expired, or has been open for too long, makes what is calibrated with it doubtful."
      aside={mayKeep ? <Button onClick={() => setAdding(true)}>Add a lot</Button> : undefined}
    >
      <Ledger
        caption="Lots"
        rows={lots}
        rowKey={(row) => row.id}
        isQuiet={(row) => row.isUsedUp}
        empty={
          <Empty
            title="No lot is in the list yet"
            sentence="Each bottle with its lot, its certificate and its expiry."
          />
        }
        columns={[
          { key: 'name', title: 'what', cell: (row) => row.name },
          { key: 'lot', title: 'lot', cell: (row) => <span className="font-mono">{row.lot}</span> },
          { key: 'value', title: 'certificate', from: 'tablet', cell: (row) => certificateText(row) },
          {
            key: 'opened',
            title: 'opened',
            from: 'desk',
            cell: (row) => (row.openedOn ? spokenDay(row.openedOn) : 'not yet'),
          },
          {
            key: 'until',
            title: 'good until',
            cell: (row) =>
              row.isUsedUp ? (
                'used up'
              ) : lotDoubt(row, today) ? (
                <b className="text-alarm">over since {spokenDay(goodUntil(row))}</b>
              ) : (
                spokenDay(goodUntil(row))
              ),
          },
          {
            key: 'act',
            title: <span className="sr-only">Acts</span>,
            align: 'right',
            cell: (row) =>
              !mayKeep || row.isUsedUp ? (
                ''
              ) : (
                <span className="inline-flex gap-4">
                  {row.openedOn === null ? (
                    <Button
                      kind="link"
                      aria-label={`${row.name}, lot ${row.lot}, is opened today`}
                      onClick={() => void change(row, { openedOn: today, isUsedUp: false })}
                    >
                      Opened today
                    </Button>
                  ) : null}
                  <Button
                    kind="link"
                    aria-label={`${row.name}, lot ${row.lot}, is used up`}
                    onClick={() => void change(row, { openedOn: row.openedOn, isUsedUp: true })}
                  >
                    Used up
                  </Button>
                </span>
              ),
          },
        ]}
      />
      <ErrorNote error={error} />
      {isAdding ? <LotDialog onClose={() => setAdding(false)} onDone={onDone} /> : null}
    </Section>
  )
}

function certificateText({ kind, certificate }: LotRow): string {
  const [first] = certificate
  if (!first) return ''
  const value = kind === 'buffer' ? `pH ${first.value.toFixed(2)}` : `${first.value} mPa·s`
  const more = certificate.length > 1 ? `, ${certificate.length - 1} more` : ''
  return `${value} at ${first.temperatureC} °C${more}`
}
