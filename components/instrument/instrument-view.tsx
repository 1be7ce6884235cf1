'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { FigureDetails } from '@/components/ui/figure-details'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import { Section } from '@/components/ui/section'
import { isOverdue } from '@/lib/calibration/rules'
import type { InstrumentPage } from '@/lib/instrument/queries/list'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { viscosityFactor } from '@/lib/science/viscosity'
import { calibrationFacts, factorFacts } from './calibration-facts'
import { ChecksPart } from './checks-part'
import { CalibrationDialog } from './calibration-dialog'
import { InstrumentDialog } from './instrument-dialog'

/** Factors are listed at one speed, so that spindles compare. */
const shownRpm = 10

type Props = {
  instrument: InstrumentPage
  today: string
  timeZone: string
  mayWrite: boolean
  mayCalibrate: boolean
}

/** One instrument with every calibration it had; none is ever changed. */
export function InstrumentView({ instrument, today, timeZone, mayWrite, mayCalibrate }: Props) {
  const router = useRouter()
  const [open, setOpen] = useState<'change' | 'calibrate' | null>(null)
  const [newest] = instrument.calibrations
  const close = () => setOpen(null)
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/instruments">Instruments</Link>, {instrument.code}, {instrument.name}
          </>
        }
        headline={<Headline instrument={instrument} today={today} />}
        sentence={newest?.detail.sentence}
        acts={
          <>
            {mayCalibrate && instrument.isActive ? (
              <Button kind="primary" onClick={() => setOpen('calibrate')}>
                Calibrate
              </Button>
            ) : null}
            {mayWrite ? <Button onClick={() => setOpen('change')}>Change the instrument</Button> : null}
          </>
        }
      />
      <div className="mt-6 grid gap-8">
        {instrument.spindles.length > 0 ? (
          <Section title="Spindles">
            <Ledger
              caption="Spindles"
              rows={instrument.spindles}
              rowKey={(row) => row.name}
              columns={[
                { key: 'name', title: 'spindle', cell: (row) => row.name },
                { key: 'constant', title: 'constant', align: 'right', cell: (row) => row.constant },
                {
                  key: 'factor',
                  title: `mPa·s a % at ${shownRpm} rpm`,
                  align: 'right',
                  cell: (row) => {
                    const factor = viscosityFactor(row.constant, shownRpm)
                    return (
                      <FigureDetails
                        figure={`${row.name}, ${factor} mPa·s a %,`}
                        facts={() => factorFacts(row.constant, shownRpm, factor)}
                      >
                        {factor}
                      </FigureDetails>
                    )
                  },
                },
              ]}
            />
          </Section>
        ) : null}
        <Section title="Calibrations">
          <Ledger
            caption="Calibrations, newest first"
            rows={instrument.calibrations}
            rowKey={(row) => row.id}
            empty={
              <Empty
                title="Not calibrated yet"
                sentence="Readings of an instrument without a calibration carry a doubt."
              />
            }
            columns={[
              { key: 'at', title: 'on', cell: (row) => spokenDay(dayIn(timeZone, row.calibratedAt)) },
              {
                key: 'result',
                title: 'result',
                cell: (row) => (
                  <span className={row.result === 'doubtful' ? 'font-650 text-alarm' : ''}>{row.result}</span>
                ),
              },
              {
                key: 'sentence',
                title: 'what it showed',
                cell: (row) => <Showed row={row} timeZone={timeZone} />,
              },
              { key: 'due', title: 'held until', from: 'tablet', cell: (row) => spokenDay(row.dueOn) },
              { key: 'by', title: 'by', cell: (row) => row.initials },
              { key: 'note', title: 'note', from: 'desk', cell: (row) => row.note },
            ]}
          />
        </Section>
        <ChecksPart
          checks={instrument.checks}
          moment={(at) => `${spokenDay(dayIn(timeZone, at))}, ${clock(timeZone, at)}`}
        />
      </div>
      {open === 'change' ? (
        <InstrumentDialog instrument={instrument} onClose={close} onDone={() => router.refresh()} />
      ) : null}
      {open === 'calibrate' ? (
        <CalibrationDialog
          instrument={instrument}
          today={today}
          onClose={close}
          onDone={() => router.refresh()}
        />
      ) : null}
    </>
  )
}

/** What a calibration showed; pressed, it says from which numbers. */
function Showed({ row, timeZone }: { row: InstrumentPage['calibrations'][number]; timeZone: string }) {
  const sentence = row.detail.sentence ?? ''
  const day = spokenDay(dayIn(timeZone, row.calibratedAt))
  const facts = calibrationFacts(row.detail, `Computed when it was logged, of ${day}.`)
  return facts ? (
    <FigureDetails figure={`“${sentence}” of ${day}`} facts={() => facts}>
      {sentence}
    </FigureDetails>
  ) : (
    sentence
  )
}

function clock(timeZone: string, at: string): string {
  return new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'short' }).format(new Date(at))
}

function Headline({ instrument, today }: { instrument: InstrumentPage; today: string }) {
  const [newest] = instrument.calibrations
  if (!instrument.isActive) return <>{instrument.code} is out of use</>
  if (!newest) return <>{instrument.code} was never calibrated</>
  const [check] = instrument.checks
  if (check?.result === 'doubtful' && Date.parse(check.checkedAt) > Date.parse(newest.calibratedAt)) {
    return (
      <>
        {instrument.code} <b>failed</b> its daily check
      </>
    )
  }
  if (newest.result === 'doubtful') {
    return (
      <>
        {instrument.code} is <b>in doubt</b>
      </>
    )
  }
  if (isOverdue(newest, today)) {
    return (
      <>
        {instrument.code} is <b>overdue</b> since {spokenDay(newest.dueOn)}
      </>
    )
  }
  return (
    <>
      {instrument.code} is <b>good</b> until {spokenDay(newest.dueOn)}
    </>
  )
}
