import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { BatchView, type BatchPart } from '@/components/batch/batch-view'
import { may } from '@/lib/auth/permissions'
import { getBatch } from '@/lib/batch/queries/get-batch'
import { batchKey } from '@/lib/batch/keys'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'batch.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

const parts: BatchPart[] = ['weighing', 'process', 'rest']

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: readSegment((await params).code) }
}

export default async function BatchPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const query = await searchParams
  const batch = await getBatch(db, actor, code).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
  return (
    <SWRConfig value={{ fallback: { [batchKey(code)]: batch } }}>
      <BatchView
        code={code}
        personId={actor.personId}
        part={parts.find((part) => part === query['part']) ?? null}
        mayWrite={may(actor, 'batch.write')}
        mayStart={may(actor, 'study.write')}
      />
    </SWRConfig>
  )
}
