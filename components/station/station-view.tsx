'use client'

import Link from 'next/link'
import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Empty } from '@/components/ui/empty'
import { FigureDetails } from '@/components/ui/figure-details'
import { Heading } from '@/components/ui/heading'
import { Ledger } from '@/components/ui/ledger'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import type { LoggerFileRow, stationRecord, StationLogRow } from '@/lib/station/queries/record'
import type { Downtime, TouchedPull } from '@/lib/station/queries/downtimes'
import type { MoveRow } from '@/lib/station/queries/moves'
import type { StandingJar } from '@/lib/station/queries/places'
import type { StationPage, StationRow } from '@/lib/station/queries/stations'
import { periodText, touches } from '@/lib/station/rules/downtime'
import type { SeriesPlace } from '@/lib/station/rules/moves'
import type { Leaving } from '@/lib/station/rules/occupancy'
import { capacityOf } from '@/lib/station/rules/places'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'
import { StationDialog } from './station-dialog'
import { excursionFacts, recordFacts } from './station-facts'
import { conditionsText } from './station-list'
import { DowntimePart } from './downtime-part'
import { MovesPart } from './moves-part'
import { OccupancyPart } from './occupancy-part'
import { ShelfRoom } from './shelf-room'
import { LoggerDialog } from './logger-dialog'
import { LoggerFiles } from './logger-files'
import { TemperatureDialog } from './temperature-dialog'
import { TemperaturePlot } from './temperature-plot'

/** The log thinned for drawing, and its newest entries. */
type Record = Awaited<ReturnType<typeof stationRecord>> & { newest: StationLogRow[] }
type Props = {
  station: StationPage
  record: Record
  loggerFiles: LoggerFileRow[]
  /** What stands here, what is planned, and where jars could go. */
  room: {
    jars: StandingJar[]
    seriesPlaces: SeriesPlace[]
    stations: StationRow[]
    leavings: Leaving[]
    downtimes: Downtime[]
    pulls: TouchedPull[]
    moves: MoveRow[]
    today: string
  }
  timeZone: string
  mayWrite: boolean
  mayLog: boolean
  mayMove: boolean
}

/** One station: its temperature record, its excursions, and whose jars stand there. */
export function StationView(props: Props) {
  const { station, record, loggerFiles, room, timeZone, mayWrite, mayLog, mayMove } = props
  const router = useRouter()
  const [open, setOpen] = useState<'change' | 'log' | 'file' | null>(null)
  const { excursions } = record
  const refresh = () => router.refresh()
  const close = () => setOpen(null)
  const moment = (instant: string) => momentIn(timeZone, instant)
  const down = room.downtimes.find((one) => one.cancelledAt === null && touches(one, room.today))
  const row = room.stations.find((one) => one.id === station.id)
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/stations">Stations</Link>, {station.name}, {conditionsText(station)}
          </>
        }
        headline={<Headline record={record} name={capital(station.name)} />}
        sentence={<RecordSentence record={record} />}
        acts={
          <>
            {mayLog ? (
              <>
                <Button kind="primary" onClick={() => setOpen('log')}>
                  Log the temperature
                </Button>
                <Button onClick={() => setOpen('file')}>Take a logger&apos;s file</Button>
              </>
            ) : null}
            {station.kind === 'freeze-thaw' ? <LinkButton href="/cycles">Cycles</LinkButton> : null}
            {mayWrite ? <Button onClick={() => setOpen('change')}>Change the station</Button> : null}
          </>
        }
      />
      {down ? (
        <p className="mt-2 font-650">
          Out of use {periodText(down)}: {down.reason}
        </p>
      ) : null}
      <div className="mt-6 grid gap-8">
        {row ? (
          <ShelfRoom
            station={row}
            jars={room.jars}
            seriesPlaces={room.seriesPlaces}
            stations={room.stations}
            mayMove={mayMove}
            onMoved={refresh}
          />
        ) : null}
        {room.leavings.length > 0 ? (
          <OccupancyPart capacity={capacityOf(station)} leavings={room.leavings} today={room.today} />
        ) : null}
        <DowntimePart
          station={station}
          downtimes={room.downtimes}
          pulls={room.pulls}
          leavings={room.leavings}
          today={room.today}
          mayWrite={mayWrite}
          onDone={refresh}
        />
        <MovesPart moves={room.moves} moment={moment} />
        <Section title="Temperature" sentence="The last 180 days. Outside the limits is washed.">
          {record.log.length === 0 ? (
            <Empty title="No temperature is logged yet" sentence="Typed by a technician, or from a logger." />
          ) : (
            <TemperaturePlot station={station} log={record.log} timeZone={timeZone} />
          )}
        </Section>
        {excursions.length > 0 ? (
          <Section title="Excursions">
            <Ledger
              caption="Excursions"
              rows={excursions.toReversed()}
              rowKey={(row) => row.from}
              columns={[
                { key: 'from', title: 'from', cell: (row) => moment(row.from) },
                { key: 'to', title: 'to', cell: (row) => moment(row.to) },
                {
                  key: 'hours',
                  title: 'hours',
                  align: 'right',
                  cell: (row) => (
                    <FigureDetails
                      figure={`${row.hours.toFixed(1)} h`}
                      facts={() => excursionFacts(row, station)}
                    >
                      {row.hours.toFixed(1)}
                    </FigureDetails>
                  ),
                },
                {
                  key: 'extreme',
                  title: 'went to',
                  align: 'right',
                  cell: (row) => <b className="text-alarm">{row.extremeC.toFixed(1).replace('-', '−')} °C</b>,
                },
                { key: 'side', title: 'limits', cell: (row) => `${row.side} them` },
              ]}
            />
          </Section>
        ) : null}
        {station.studies.length > 0 ? (
          <Section title="Studies here">
            <ul className="flex flex-wrap gap-x-6 gap-y-2">
              {station.studies.map((study) => (
                <li key={study.code}>
                  <Link href={`/studies/${study.code}`} className="underline underline-offset-4">
                    {study.code}
                  </Link>{' '}
                  {study.title}, {study.voice}
                  {study.state === 'closed' ? ', ended' : ''}
                </li>
              ))}
            </ul>
          </Section>
        ) : null}
        <LoggerFiles files={loggerFiles} moment={moment} />
        {record.log.length > 0 ? (
          <Section title="Log">
            <Ledger
              caption="The newest forty temperatures"
              rows={record.newest}
              rowKey={(row) => row.id}
              columns={[
                { key: 'at', title: 'when', cell: (row) => moment(row.measuredAt) },
                {
                  key: 'temperature',
                  title: '°C',
                  align: 'right',
                  cell: (row) => row.temperatureC.toFixed(1).replace('-', '−'),
                },
                { key: 'source', title: 'how', cell: (row) => row.source },
                { key: 'who', title: 'by', cell: (row) => row.initials },
              ]}
            />
          </Section>
        ) : null}
      </div>
      {open === 'change' ? (
        <StationDialog station={station} nextOrder={station.walkOrder} onClose={close} onDone={refresh} />
      ) : null}
      {open === 'file' ? <LoggerDialog station={station} onClose={close} onDone={refresh} /> : null}
      {open === 'log' ? <TemperatureDialog station={station} onClose={close} onDone={refresh} /> : null}
    </>
  )
}

function Headline({ record, name }: { record: Record; name: string }) {
  if (record.log.length === 0) return <>{name} has no record yet</>
  if (record.excursions.length === 0) {
    return (
      <>
        {name} <b>stayed inside</b> its limits
      </>
    )
  }
  return (
    <>
      {name} left its limits{' '}
      <b>{record.excursions.length === 1 ? 'once' : `${counted(record.excursions.length, 'time')}`}</b>
    </>
  )
}

function RecordSentence({ record }: { record: Record }) {
  const { mktC, meanC, minC, maxC, readings } = record
  if (mktC === null || meanC === null || minC === null || maxC === null) return null
  const shown = (value: number) => value.toFixed(1).replace('-', '−')
  return (
    <>
      Mean kinetic temperature{' '}
      <FigureDetails figure={`${shown(mktC)} °C`} facts={() => recordFacts(record)} />, mean {shown(meanC)}{' '}
      °C, from {shown(minC)} to {shown(maxC)} °C. {capital(counted(readings, 'reading'))} in 180 days. The
      mean kinetic temperature never excuses an excursion.
    </>
  )
}

function momentIn(timeZone: string, instant: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { timeZone, timeStyle: 'short' }).format(new Date(instant))
  return `${spokenDay(dayIn(timeZone, instant))}, ${time}`
}
