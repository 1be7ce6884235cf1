import type { Metadata } from 'next'
import { InstrumentList } from '@/components/instrument/instrument-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listInstruments } from '@/lib/instrument/queries'
import { getLab } from '@/lib/lab/queries'
import { dayIn } from '@/lib/study/rules/calendar'

export const permission = 'instrument.read'
export const metadata: Metadata = { title: 'Instruments' }

export default async function InstrumentsPage() {
  const { actor, db, now } = await page(permission)
  const instruments = await listInstruments(db, actor)
  const lab = await getLab(db)
  return (
    <InstrumentList
      instruments={instruments}
      today={dayIn(lab.timeZone, now)}
      mayWrite={may(actor, 'instrument.write')}
      mayCalibrate={may(actor, 'instrument.calibrate')}
    />
  )
}
