import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { StationView } from '@/components/station/station-view'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listLoggerFiles, stationRecord } from '@/lib/station/queries/record'
import { listComingPulls, listDowntimes } from '@/lib/station/queries/downtimes'
import { listMoves } from '@/lib/station/queries/moves'
import { listLeavings, listSeriesPlaces, listStandingJars } from '@/lib/station/queries/places'
import { getStation, listStations } from '@/lib/station/queries/stations'
import { thinned } from '@/lib/station/rules/thin'
import { dayIn } from '@/lib/study/rules/calendar'
import { stationAddress } from '@/lib/station/schema'
import { found } from '../../studies/found'

export const permission = 'station.read'
export const metadata: Metadata = { title: 'Station' }

type Props = { params: Promise<{ id: string }> }

const shownDays = 180
/** More than a screen has columns. */
const drawnSteps = 800

export default async function StationPage({ params }: Props) {
  const { actor, db, now } = await page(permission)
  const address = stationAddress.safeParse(await params)
  if (!address.success) notFound()
  const station = await found(getStation(db, actor, address.data.id))
  const from = new Date(Date.parse(now) - shownDays * 86_400_000).toISOString()
  const whole = await stationRecord(db, station.id, from, now)
  const record = {
    ...whole,
    log: thinned(whole.log, drawnSteps),
    newest: whole.log.toReversed().slice(0, 40),
  }
  const lab = await getLab(db)
  const today = dayIn(lab.timeZone, now)
  const leavings = await listLeavings(db)
  const room = {
    jars: await listStandingJars(db, station.id),
    seriesPlaces: await listSeriesPlaces(db, station.id),
    stations: await listStations(db, actor),
    leavings: leavings.filter((one) => one.stationId === station.id),
    downtimes: await listDowntimes(db, station.id, today),
    pulls: await listComingPulls(db, station.id),
    moves: await listMoves(db, station.id),
    today,
  }
  return (
    <StationView
      station={station}
      record={record}
      loggerFiles={await listLoggerFiles(db, station.id)}
      room={room}
      timeZone={lab.timeZone}
      mayWrite={may(actor, 'station.write')}
      mayLog={may(actor, 'station.log')}
      mayMove={may(actor, 'jar.move')}
    />
  )
}
