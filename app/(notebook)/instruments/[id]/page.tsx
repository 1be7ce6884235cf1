import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { InstrumentView } from '@/components/instrument/instrument-view'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getInstrument } from '@/lib/instrument/queries/list'
import { instrumentAddress } from '@/lib/instrument/schema'
import { getLab } from '@/lib/lab/queries'
import { dayIn } from '@/lib/study/rules/calendar'
import { found } from '../../studies/found'

export const permission = 'instrument.read'
export const metadata: Metadata = { title: 'Instrument' }

type Props = { params: Promise<{ id: string }> }

export default async function InstrumentPage({ params }: Props) {
  const { actor, db, now } = await page(permission)
  const address = instrumentAddress.safeParse(await params)
  if (!address.success) notFound()
  const instrument = await found(getInstrument(db, actor, address.data.id))
  const lab = await getLab(db)
  return (
    <InstrumentView
      instrument={instrument}
      today={dayIn(lab.timeZone, now)}
      timeZone={lab.timeZone}
      mayWrite={may(actor, 'instrument.write')}
      mayCalibrate={may(actor, 'instrument.calibrate')}
    />
  )
}
