import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { studyRights } from '@/components/study/rights'
import { StudyReadings } from '@/components/study/study-readings'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { getStudyReadings } from '@/lib/study/queries/readings'
import { studyKeys } from '@/lib/study/schema'
import { found } from '../../found'

export const permission = 'reading.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${decodeURIComponent((await params).code)}, readings` }
}

export default async function ReadingsPage({ params }: Props) {
  const { actor, db } = await page(permission)
  const code = decodeURIComponent((await params).code)
  const readings = await found(getStudyReadings(db, actor, code))
  const lab = await getLab(db)
  return (
    <SWRConfig value={{ fallback: { [studyKeys.readings(code)]: readings } }}>
      <StudyReadings
        code={code}
        rights={studyRights(actor)}
        timeZone={lab.timeZone}
        personId={actor.personId}
        mayLog={may(actor, 'reading.log')}
      />
    </SWRConfig>
  )
}
