import type { Metadata } from 'next'
import { DaySheet } from '@/components/bench/day-sheet'
import { todaysBench } from '@/lib/bench/queries/today'
import { page } from '@/lib/http/page'

export const permission = 'bench.read'
export const metadata: Metadata = { title: 'Day sheet' }

type Props = { searchParams: Promise<{ blanks?: string }> }

export default async function DaySheetPage({ searchParams }: Props) {
  const { blanks } = await searchParams
  const { actor, db } = await page(permission)
  return <DaySheet bench={await todaysBench(db, actor)} hasBlanks={blanks === 'yes'} />
}
