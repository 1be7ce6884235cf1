import type { Metadata } from 'next'
import { MorningChecks } from '@/components/instrument/morning-checks'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listInstruments } from '@/lib/instrument/queries/list'
import { getLab } from '@/lib/lab/queries'
import { listLots } from '@/lib/lot/queries'
import { dayIn } from '@/lib/study/rules/calendar'

export const permission = 'instrument.read'
export const metadata: Metadata = { title: 'Daily checks' }

export default async function ChecksPage() {
  const { actor, db, now } = await page(permission)
  const instruments = await listInstruments(db, actor)
  const lots = await listLots(db, actor)
  const lab = await getLab(db)
  return (
    <MorningChecks
      instruments={instruments}
      lots={lots}
      today={dayIn(lab.timeZone, now)}
      timeZone={lab.timeZone}
      mayCheck={may(actor, 'instrument.calibrate')}
    />
  )
}
