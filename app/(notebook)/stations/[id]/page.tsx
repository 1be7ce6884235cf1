import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { StationView } from '@/components/station/station-view'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { stationRecord } from '@/lib/station/queries/record'
import { getStation } from '@/lib/station/queries/stations'
import { stationAddress } from '@/lib/station/schema'
import { found } from '../../studies/found'

export const permission = 'station.read'
export const metadata: Metadata = { title: 'Station' }

type Props = { params: Promise<{ id: string }> }

const shownDays = 180

export default async function StationPage({ params }: Props) {
  const { actor, db, now } = await page(permission)
  const address = stationAddress.safeParse(await params)
  if (!address.success) notFound()
  const station = await found(getStation(db, actor, address.data.id))
  const from = new Date(Date.parse(now) - shownDays * 86_400_000).toISOString()
  const record = await stationRecord(db, station.id, from, now)
  const lab = await getLab(db)
  return (
    <StationView
      station={station}
      record={record}
      timeZone={lab.timeZone}
      mayWrite={may(actor, 'station.write')}
      mayLog={may(actor, 'station.log')}
    />
  )
}
