import type { Metadata } from 'next'
import { studyRights } from '@/components/study/rights'
import { StudyRecord } from '@/components/study/study-record'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getStudyHead, listStudyBatches } from '@/lib/study/queries/head'
import { headOf } from '@/lib/study/queries/sheet'
import { listTrail } from '@/lib/trail/queries'
import { trailList } from '@/lib/trail/rules/list'
import { found } from '../../found'

export const permission = 'trail.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, record` }
}

export default async function RecordPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const study = await found(getStudyHead(db, actor, readSegment((await params).code)))
  const { order, place } = trailList.query.parse(await searchParams)
  const query = { ...trailList.query.parse({ study: study.code }), order, place }
  const batches = await listStudyBatches(db, study.id)
  const trail = await listTrail(db, actor, query)
  return (
    <StudyRecord
      study={headOf(study)}
      batches={batches}
      rights={studyRights(actor)}
      trail={trail}
      query={query}
    />
  )
}
