import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { PaperSheet } from '@/components/batch/paper-sheet'
import { getBatch } from '@/lib/batch/queries/get-batch'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'batch.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Paper sheet of ${readSegment((await params).code)}` }
}

export default async function PaperPage({ params }: Props) {
  const { actor, db } = await page(permission)
  const batch = await getBatch(db, actor, readSegment((await params).code)).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
  return <PaperSheet batch={batch} />
}
