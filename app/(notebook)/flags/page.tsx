import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { readShown } from '@/components/flag/flag-filter'
import { FlagList } from '@/components/flag/flag-list'
import { flagRights } from '@/components/flag/rights'
import { listFlags } from '@/lib/flag/queries/list'
import { flagKeys } from '@/lib/flag/schema'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'

export const permission = 'reading.read'
export const metadata: Metadata = { title: 'Flags' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function FlagsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const shown = readShown(await searchParams)
  const flags = await listFlags(db, actor)
  const { timeZone } = await getLab(db)
  return (
    <SWRConfig value={{ fallback: { [flagKeys.list]: flags } }}>
      <FlagList shown={shown} rights={flagRights(actor)} timeZone={timeZone} />
    </SWRConfig>
  )
}
