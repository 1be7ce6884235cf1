import type { Metadata } from 'next'
import { SWRConfig } from 'swr'
import { StudyLedger } from '@/components/study/study-ledger'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listStudies } from '@/lib/study/queries/ledger'
import { studyFilter, studyKeys } from '@/lib/study/schema'

export const permission = 'study.read'
export const metadata: Metadata = { title: 'Studies' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function StudiesPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const filter = studyFilter.parse(await searchParams)
  const [lab, ledger] = [await getLab(db), await listStudies(db, actor, filter)]
  return (
    <SWRConfig value={{ fallback: { [studyKeys.list(filter)]: ledger } }}>
      <StudyLedger filter={filter} mayStart={may(actor, 'study.write')} labName={lab.name} />
    </SWRConfig>
  )
}
