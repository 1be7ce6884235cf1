import type { Metadata } from 'next'
import { studyRights } from '@/components/study/rights'
import { StudyJars } from '@/components/study/study-jars'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'
import { getLab } from '@/lib/lab/queries'
import { listStudyJars } from '@/lib/study/queries/jars'
import { jarList } from '@/lib/study/rules/jar-list'
import { found } from '../../found'

export const permission = 'bench.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export async function generateMetadata({ params }: Pick<Props, 'params'>): Promise<Metadata> {
  return { title: `${readSegment((await params).code)}, jars` }
}

export default async function JarsPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const query = jarList.query.parse(await searchParams)
  const jars = await found(listStudyJars(db, actor, code, query))
  const { timeZone } = await getLab(db)
  return (
    <StudyJars
      page={jars}
      query={query}
      rights={studyRights(actor)}
      mayLog={may(actor, 'reading.log')}
      timeZone={timeZone}
    />
  )
}
