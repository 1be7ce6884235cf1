import type { Metadata } from 'next'
import { FlagList } from '@/components/flag/flag-list'
import { flagRights } from '@/components/flag/rights'
import { listFlags } from '@/lib/flag/queries/list'
import { flagList } from '@/lib/flag/rules/list'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'

export const permission = 'reading.read'
export const metadata: Metadata = { title: 'Flags' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function FlagsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = flagList.query.parse(await searchParams)
  const flags = await listFlags(db, actor, query)
  const { timeZone } = await getLab(db)
  return <FlagList page={flags} query={query} rights={flagRights(actor)} timeZone={timeZone} />
}
