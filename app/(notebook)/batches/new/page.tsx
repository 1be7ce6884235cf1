import type { Metadata } from 'next'
import { SizeBatch } from '@/components/batch/size-batch'
import { findVersion } from '@/lib/formula/queries/find-version'
import { listLatestVersions } from '@/lib/formula/queries/list-formulas'
import { page } from '@/lib/http/page'
import { listProtocols } from '@/lib/protocol/queries'

export const permission = 'batch.write'
export const metadata: Metadata = { title: 'Size a batch' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function NewBatchPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const { formula, version } = await searchParams
  const asked = typeof formula === 'string' ? formula : null
  const [latest, protocols, earlier] = await Promise.all([
    listLatestVersions(db, actor),
    listProtocols(db, actor),
    asked && version ? findVersion(db, actor, asked, Number(version)) : null,
  ])
  return (
    <SizeBatch
      formulas={latest.map((one) => (one.code === earlier?.code ? { ...one, ...earlier } : one))}
      protocols={protocols.map(({ code, name, versionId, number, plan }) => ({
        ...{ code, name, versionId, number, plan },
      }))}
      formulaCode={asked}
    />
  )
}
