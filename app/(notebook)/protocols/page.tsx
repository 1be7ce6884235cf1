import type { Metadata } from 'next'
import { ProtocolList } from '@/components/protocol/protocol-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listProtocolPage } from '@/lib/protocol/queries'
import { protocolList } from '@/lib/protocol/rules/list'

export const permission = 'protocol.read'
export const metadata: Metadata = { title: 'Protocols' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function ProtocolsPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = protocolList.query.parse(await searchParams)
  const found = await listProtocolPage(db, actor, query)
  const { timeZone } = await getLab(db)
  return (
    <ProtocolList page={found} query={query} mayWrite={may(actor, 'protocol.write')} timeZone={timeZone} />
  )
}
