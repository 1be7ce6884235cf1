import type { Metadata } from 'next'
import { StationList } from '@/components/station/station-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listStations } from '@/lib/station/queries/stations'

export const permission = 'station.read'
export const metadata: Metadata = { title: 'Stations' }

export default async function StationsPage() {
  const { actor, db } = await page(permission)
  const stations = await listStations(db, actor)
  const lab = await getLab(db)
  return (
    <StationList
      stations={stations}
      timeZone={lab.timeZone}
      mayWrite={may(actor, 'station.write')}
      mayLog={may(actor, 'station.log')}
    />
  )
}
