'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { ListLedger } from '@/components/list/list-ledger'
import { ListTools } from '@/components/list/list-tools'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import type { InstrumentRow, InstrumentsPage } from '@/lib/instrument/queries/list'
import { instrumentList } from '@/lib/instrument/rules/list'
import type { ListQuery } from '@/lib/list/schema'
import { isOverdue } from '@/lib/calibration/rules'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, numberWord } from '@/lib/study/rules/words'
import type { LotRow } from '@/lib/lot/queries'
import { LotsPart } from './lots-part'
import { CalibrationDialog } from './calibration-dialog'
import { InstrumentDialog } from './instrument-dialog'

type Props = {
  /** All of them, for the headline. */
  instruments: InstrumentRow[]
  page: InstrumentsPage
  query: ListQuery
  timeZone: string
  today: string
  mayWrite: boolean
  mayCalibrate: boolean
  lots: LotRow[]
}

/** Instruments with what their last calibration showed and until when it holds. */
export function InstrumentList(props: Props) {
  const { instruments, page, query, timeZone, today, mayWrite, mayCalibrate, lots } = props
  const router = useRouter()
  const [isAdding, setIsAdding] = useState(false)
  const [calibrated, setCalibrated] = useState<InstrumentRow | null>(null)
  const inUse = instruments.filter((one) => one.isActive)
  const wanting = inUse.filter(
    (one) => isOverdue(dueOf(one), today) || one.result === 'doubtful' || one.checkResult === 'doubtful',
  )
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
        acts={
          instruments.length > 0 ? (
            <>
              {add}
              <LinkButton href="/instruments/checks">Daily checks</LinkButton>
            </>
          ) : undefined
        }
      />
      <div className="mt-5">
        <ListTools
          list={instrumentList}
          path="/instruments"
          query={query}
          searchLabel="Find an instrument"
          placeholder="Code, name or kind"
          total={page.total}
        />
      </div>
      <div className="mt-3">
        <ListLedger
          list={instrumentList}
          path="/instruments"
          query={query}
          page={page}
          caption="Instruments"
          timeZone={timeZone}
          rowKey={(row) => row.id}
          isQuiet={(row) => !row.isActive}
          cells={cellsOn(today)}
          after={[
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
          empty={
            instruments.length > 0 ? (
              <Empty
                title={query.q ? `No instrument has ${query.q}.` : 'No instrument is of that kind.'}
                act={<LinkButton href="/instruments">Show all instruments</LinkButton>}
              />
            ) : (
              <Empty
                title="What the lab measures with"
                sentence="pH meters, viscometers and balances: each with its calibrations and when the next is due."
                act={add}
              />
            )
          }
        />
      </div>
      <div className="mt-8">
        <LotsPart lots={lots} today={today} mayKeep={mayCalibrate} onDone={() => router.refresh()} />
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

function cellsOn(today: string): Parameters<typeof ListLedger<InstrumentRow>>[0]['cells'] {
  return {
    code: {
      width: '80px',
      cell: (row) => (
        <Link href={`/instruments/${row.id}`} className="font-650 underline-offset-4 hover:underline">
          {row.code}
        </Link>
      ),
    },
    kind: { from: 'tablet' },
    result: {
      from: 'tablet',
      cell: (row) => (
        <span className={row.result === 'doubtful' ? 'font-650 text-alarm' : ''}>
          {row.result ?? 'none yet'}
        </span>
      ),
    },
    sentence: { from: 'desk' },
    due: { cell: (row) => <Due row={row} today={today} /> },
  }
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
      <span className="whitespace-nowrap">{spokenDay(row.dueOn)}</span>
      {late ? ', overdue' : ''}
    </span>
  )
}
