import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { studyRights } from '@/components/study/rights'
import { StudySheet } from '@/components/study/study-sheet'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getSheet } from '@/lib/study/queries/sheet'
import { studyKeys } from '@/lib/study/keys'
import { found } from '../found'

export const permission = 'study.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, sheet` }
}

export default async function SheetPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const { batch } = await searchParams
  const sheet = await found(getSheet(db, actor, code))
  return (
    <SWRConfig value={{ fallback: { [studyKeys.sheet(code)]: sheet } }}>
      <StudySheet code={code} rights={studyRights(actor)} batch={typeof batch === 'string' ? batch : null} />
    </SWRConfig>
  )
}
