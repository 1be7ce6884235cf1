import type { Metadata } from 'next'
import { DayList } from '@/components/day/day-list'
import { listDays } from '@/lib/day/queries/days'
import { page } from '@/lib/http/page'

export const permission = 'reading.read'
export const metadata: Metadata = { title: 'Days' }

export default async function DaysPage() {
  const { actor, db } = await page(permission)
  return <DayList days={await listDays(db, actor)} />
}
