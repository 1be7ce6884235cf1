import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { BenchApp } from '@/components/bench/bench-app'
import { may } from '@/lib/auth/permissions'
import { todaysBench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { page } from '@/lib/http/page'

export const permission = 'bench.read'
export const metadata: Metadata = { title: 'Bench' }

export default async function BenchPage() {
  const { actor, db } = await page(permission)
  const bench = await todaysBench(db, actor)
  return (
    <SWRConfig value={{ fallback: { [benchKeys.today]: bench } }}>
      <BenchApp
        person={{
          personId: actor.personId,
          initials: actor.initials,
          mayLog: may(actor, 'reading.log'),
          mayAddPhotos: may(actor, 'photo.add'),
          mayLogTemperature: may(actor, 'station.log'),
        }}
      />
    </SWRConfig>
  )
}
