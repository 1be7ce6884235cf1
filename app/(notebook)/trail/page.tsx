import type { Metadata } from 'next'
import { TrailView } from '@/components/trail/trail-view'
import type { Actor } from '@/lib/auth/actor'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listTrail } from '@/lib/trail/queries'
import { trailList } from '@/lib/trail/rules/list'

export const permission = 'trail.read'
export const metadata: Metadata = { title: 'Record' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function TrailPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = trailList.query.parse(await searchParams)
  const trail = await listTrail(db, actor, query)
  const { timeZone } = await getLab(db)
  return <TrailView page={trail} query={query} timeZone={timeZone} scope={scopeOf(actor)} />
}

function scopeOf({ roles }: Actor): string {
  if (roles.includes('qa') || roles.includes('manager')) return 'You read all of it.'
  return roles.includes('formulator')
    ? 'You read your own entries and those of your studies.'
    : 'You read your own entries.'
}
