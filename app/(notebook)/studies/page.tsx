import type { Metadata } from 'next'
import { StudyLedger } from '@/components/study/study-ledger'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listStudies } from '@/lib/study/queries/ledger'
import { studyList } from '@/lib/study/rules/list'

export const permission = 'study.read'
export const metadata: Metadata = { title: 'Studies' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function StudiesPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = studyList.query.parse(await searchParams)
  const [lab, ledger] = [await getLab(db), await listStudies(db, actor, query)]
  return <StudyLedger ledger={ledger} query={query} mayStart={may(actor, 'study.write')} lab={lab} />
}
