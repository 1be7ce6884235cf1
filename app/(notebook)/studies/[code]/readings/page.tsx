import type { Metadata } from 'next'
import { studyRights } from '@/components/study/rights'
import { StudyReadings } from '@/components/study/study-readings'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getLab } from '@/lib/lab/queries'
import { listStudyReadings } from '@/lib/study/queries/readings'
import { readingList } from '@/lib/study/rules/reading-list'
import { found } from '../../found'

export const permission = 'reading.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Pick<Props, 'params'>): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, readings` }
}

export default async function ReadingsPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const query = readingList.query.parse(await searchParams)
  const readings = await found(listStudyReadings(db, actor, code, query))
  const lab = await getLab(db)
  return (
    <StudyReadings
      page={readings}
      query={query}
      rights={studyRights(actor)}
      timeZone={lab.timeZone}
      personId={actor.personId}
      mayLog={may(actor, 'reading.log')}
    />
  )
}
