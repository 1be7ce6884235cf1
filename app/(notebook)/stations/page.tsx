import type { Metadata } from 'next'
import { StationList } from '@/components/station/station-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listStationPage, listStations } from '@/lib/station/queries/stations'
import { stationList } from '@/lib/station/rules/list'

export const permission = 'station.read'
export const metadata: Metadata = { title: 'Stations' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function StationsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const stations = await listStations(db, actor)
  const query = stationList.query.parse(await searchParams)
  const found = await listStationPage(db, actor, query)
  const lab = await getLab(db)
  return (
    <StationList
      stations={stations}
      page={found}
      query={query}
      timeZone={lab.timeZone}
      mayWrite={may(actor, 'station.write')}
      mayLog={may(actor, 'station.log')}
    />
  )
}
