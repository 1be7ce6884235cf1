import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { LabSettings } from '@/components/lab/lab-settings'
import { getCalendar, listHolidays } from '@/lib/holiday/queries'
import { holidayKeys } from '@/lib/holiday/keys'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { labKey } from '@/lib/lab/keys'
import { listPullsOnClosedDays } from '@/lib/pull/queries/on-closed-days'
import { pullKeys } from '@/lib/pull/keys'

export const permission = 'lab.manage'
export const metadata: Metadata = { title: 'The lab’s settings' }

export default async function LabSettingsPage() {
  const { db } = await page(permission)
  const { today } = await getCalendar(db)
  const fallback = {
    [labKey]: await getLab(db),
    [holidayKeys.list]: await listHolidays(db),
    [pullKeys.moves]: await listPullsOnClosedDays(db),
  }
  return (
    <SWRConfig value={{ fallback }}>
      <LabSettings today={today} timeZones={Intl.supportedValuesOf('timeZone')} />
    </SWRConfig>
  )
}
