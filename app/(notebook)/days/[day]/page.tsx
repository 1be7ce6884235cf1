import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { DayView } from '@/components/day/day-view'
import { may } from '@/lib/auth/permissions'
import { getDay } from '@/lib/day/queries/day'
import { dayAddress } from '@/lib/day/schema'
import { page } from '@/lib/http/page'

export const permission = 'reading.read'
export const metadata: Metadata = { title: 'A day' }

type Props = { params: Promise<{ day: string }> }

export default async function DayPage({ params }: Props) {
  const asked = dayAddress.safeParse(await params)
  if (!asked.success) notFound()
  const { actor, db } = await page(permission)
  const day = await getDay(db, actor, asked.data.day)
  return <DayView day={day} mayReview={may(actor, 'day.review')} />
}
