'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import type { InstrumentRow } from '@/lib/instrument/queries'
import { isOverdue } from '@/lib/calibration/rules'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, numberWord } from '@/lib/study/rules/words'
import { CalibrationDialog } from './calibration-dialog'
import { InstrumentDialog } from './instrument-dialog'

type Props = { instruments: InstrumentRow[]; today: string; mayWrite: boolean; mayCalibrate: boolean }

/** Instruments with what their last calibration showed and until when it holds. */
export function InstrumentList({ instruments, today, mayWrite, mayCalibrate }: Props) {
  const router = useRouter()
  const [isAdding, setIsAdding] = useState(false)
  const [calibrated, setCalibrated] = useState<InstrumentRow | null>(null)
  const inUse = instruments.filter((one) => one.isActive)
  const wanting = inUse.filter((one) => isOverdue(dueOf(one), today) || one.result === 'doubtful')
  const add = mayWrite ? (
    <Button kind="primary" onClick={() => setIsAdding(true)}>
      Add an instrument
    </Button>
  ) : undefined
  return (
    <>
      <Heading
        crumb="Instruments"
        headline={
          inUse.length === 0 ? (
            'No instrument is here yet'
          ) : wanting.length === 0 ? (
            <>
              <b>Every instrument</b> is calibrated and good
            </>
          ) : (
            <>
              <b>
                {capital(numberWord(wanting.length))} of {inUse.length}
              </b>{' '}
              {wanting.length === 1 ? 'instrument wants' : 'instruments want'} a calibration
            </>
          )
        }
        sentence={
          wanting.length > 0
            ? `Readings of ${wanting.map((one) => one.code).join(', ')} carry a doubt until it is done.`
            : undefined
        }
        acts={instruments.length > 0 ? add : undefined}
      />
      <div className="mt-6">
        <Ledger
          caption="Instruments"
          rows={instruments}
          rowKey={(row) => row.id}
          isQuiet={(row) => !row.isActive}
          empty={
            <Empty
              title="What the lab measures with"
              sentence="pH meters, viscometers and balances: each with its calibrations and when the next is due."
              act={add}
            />
          }
          columns={[
            {
              key: 'code',
              title: 'code',
              width: '80px',
              cell: (row) => (
                <Link href={`/instruments/${row.id}`} className="font-650 underline-offset-4 hover:underline">
                  {row.code}
                </Link>
              ),
            },
            { key: 'name', title: 'name', cell: (row) => row.name },
            { key: 'kind', title: 'kind', from: 'tablet', cell: (row) => row.kind },
            {
              key: 'result',
              title: 'last calibration',
              cell: (row) => (
                <span className={row.result === 'doubtful' ? 'font-650 text-alarm' : ''}>
                  {row.result ?? 'none yet'}
                </span>
              ),
            },
            {
              key: 'sentence',
              title: 'what it showed',
              from: 'desk',
              cell: (row) => row.detail?.sentence ?? '',
            },
            { key: 'due', title: 'due', cell: (row) => <Due row={row} today={today} /> },
            {
              key: 'act',
              title: <span className="sr-only">Acts</span>,
              align: 'right',
              cell: (row) =>
                mayCalibrate && row.isActive ? (
                  <Button kind="link" aria-label={`Calibrate ${row.code}`} onClick={() => setCalibrated(row)}>
                    Calibrate
                  </Button>
                ) : row.isActive ? (
                  ''
                ) : (
                  'out of use'
                ),
            },
          ]}
        />
      </div>
      {isAdding ? (
        <InstrumentDialog
          instrument={null}
          onClose={() => setIsAdding(false)}
          onDone={() => router.refresh()}
        />
      ) : null}
      {calibrated ? (
        <CalibrationDialog
          instrument={calibrated}
          today={today}
          onClose={() => setCalibrated(null)}
          onDone={() => router.refresh()}
        />
      ) : null}
    </>
  )
}

function dueOf(row: InstrumentRow): { dueOn: string } | null {
  return row.dueOn === null ? null : { dueOn: row.dueOn }
}

function Due({ row, today }: { row: InstrumentRow; today: string }) {
  if (!row.isActive) return ''
  if (row.dueOn === null) return <span className="text-alarm">now</span>
  const late = isOverdue({ dueOn: row.dueOn }, today)
  return (
    <span className={late ? 'font-650 text-alarm' : ''}>
      {spokenDay(row.dueOn)}
      {late ? ', overdue' : ''}
    </span>
  )
}
