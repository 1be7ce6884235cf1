import type { Metadata } from 'next'
import { SizeBatch } from '@/components/batch/size-batch'
import { listLatestVersions } from '@/lib/formula/queries/list-formulas'
import { page } from '@/lib/http/page'
import { listProtocols } from '@/lib/protocol/queries'

export const permission = 'batch.write'
export const metadata: Metadata = { title: 'Size a batch' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function NewBatchPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const { formula } = await searchParams
  const [formulas, protocols] = await Promise.all([listLatestVersions(db, actor), listProtocols(db, actor)])
  return (
    <SizeBatch
      formulas={formulas}
      protocols={protocols.map(({ code, name, versionId, number, plan }) => ({
        ...{ code, name, versionId, number, plan },
      }))}
      formulaCode={typeof formula === 'string' ? formula : null}
    />
  )
}
