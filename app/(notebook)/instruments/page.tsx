import type { Metadata } from 'next'
import { InstrumentList } from '@/components/instrument/instrument-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listInstrumentPage, listInstruments } from '@/lib/instrument/queries/list'
import { instrumentList } from '@/lib/instrument/rules/list'
import { getLab } from '@/lib/lab/queries'
import { listLots } from '@/lib/lot/queries'
import { dayIn } from '@/lib/study/rules/calendar'

export const permission = 'instrument.read'
export const metadata: Metadata = { title: 'Instruments' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function InstrumentsPage({ searchParams }: Props) {
  const { actor, db, now } = await page(permission)
  const instruments = await listInstruments(db, actor)
  const query = instrumentList.query.parse(await searchParams)
  const found = await listInstrumentPage(db, actor, query)
  const lots = await listLots(db, actor)
  const lab = await getLab(db)
  return (
    <InstrumentList
      instruments={instruments}
      page={found}
      lots={lots}
      query={query}
      timeZone={lab.timeZone}
      today={dayIn(lab.timeZone, now)}
      mayWrite={may(actor, 'instrument.write')}
      mayCalibrate={may(actor, 'instrument.calibrate')}
    />
  )
}
