import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { studyRights } from '@/components/study/rights'
import { StudyJars } from '@/components/study/study-jars'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getStudyJars } from '@/lib/study/queries/jars'
import { studyKeys } from '@/lib/study/schema'
import { found } from '../../found'

export const permission = 'bench.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${decodeURIComponent((await params).code)}, jars` }
}

export default async function JarsPage({ params }: Props) {
  const { actor, db } = await page(permission)
  const code = decodeURIComponent((await params).code)
  const jars = await found(getStudyJars(db, actor, code))
  return (
    <SWRConfig value={{ fallback: { [studyKeys.jars(code)]: jars } }}>
      <StudyJars code={code} rights={studyRights(actor)} mayLog={may(actor, 'reading.log')} />
    </SWRConfig>
  )
}
