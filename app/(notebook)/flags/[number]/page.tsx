import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { flagContext } from '@/components/flag/flag-context'
import { FlagView } from '@/components/flag/flag-view'
import { flagRights } from '@/components/flag/rights'
import { getFlag } from '@/lib/flag/queries/one'
import { flagKeys } from '@/lib/flag/keys'
import { flagAddress } from '@/lib/flag/schema'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { getCurves } from '@/lib/study/queries/curves'
import { getSheet } from '@/lib/study/queries/sheet'

export const permission = 'reading.read'

type Props = { params: Promise<{ number: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Flag ${(await params).number}` }
}

export default async function FlagPage({ params }: Props) {
  const { actor, db } = await page(permission)
  const address = flagAddress.safeParse(await params)
  if (!address.success) notFound()
  const { number } = address.data
  const flag = await getFlag(db, actor, number).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
  const curves = await getCurves(db, actor, flag.studyCode)
  const sheet = await getSheet(db, actor, flag.studyCode)
  return (
    <SWRConfig value={{ fallback: { [flagKeys.one(number)]: flag } }}>
      <FlagView number={number} context={flagContext(flag, curves, sheet)} rights={flagRights(actor)} />
    </SWRConfig>
  )
}
