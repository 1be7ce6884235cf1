import type { Metadata } from 'next'
import { ProtocolList } from '@/components/protocol/protocol-list'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { listProtocols } from '@/lib/protocol/queries'

export const permission = 'protocol.read'
export const metadata: Metadata = { title: 'Protocols' }

export default async function ProtocolsPage() {
  const { actor, db } = await page(permission)
  const protocols = await listProtocols(db, actor)
  return <ProtocolList protocols={protocols} mayWrite={may(actor, 'protocol.write')} />
}
