import type { Metadata } from 'next'
import { ProtocolView } from '@/components/protocol/protocol-view'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getProtocol } from '@/lib/protocol/queries'
import { found } from '../../studies/found'

export const permission = 'protocol.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: readSegment((await params).code) }
}

export default async function ProtocolPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const protocol = await found(getProtocol(db, actor, readSegment((await params).code)))
  const number = Number((await searchParams)['version'])
  return (
    <ProtocolView
      key={`${protocol.versions[0]?.id} ${number}`}
      protocol={protocol}
      number={Number.isInteger(number) ? number : null}
      mayWrite={may(actor, 'protocol.write')}
      mayStart={may(actor, 'study.write')}
      approver={may(actor, 'protocol.approve') ? actor.personId : null}
    />
  )
}
