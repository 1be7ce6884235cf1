import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { BenchApp } from '@/components/bench/bench-app'
import { may } from '@/lib/auth/permissions'
import { getBenchJar } from '@/lib/bench/queries/jar'
import { todaysBench } from '@/lib/bench/queries/today'
import { benchKeys } from '@/lib/bench/keys'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'bench.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Jar ${readSegment((await params).code)}` }
}

export default async function BenchJarPage({ params }: Props) {
  const code = readSegment((await params).code)
  const { actor, db } = await page(permission)
  const bench = await todaysBench(db, actor)
  const jar = await getBenchJar(db, actor, code).catch((error: unknown) => {
    if (error instanceof AppError && error.status === 404) notFound()
    throw error
  })
  return (
    <SWRConfig value={{ fallback: { [benchKeys.today]: bench, [benchKeys.jar(code)]: jar } }}>
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
