import type { Metadata } from 'next'
import { CaseList } from '@/components/shelf-case/case-list'
import { Heading } from '@/components/ui/heading'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'
import { listCases } from '@/lib/shelf-case/queries/list'
import { caseList } from '@/lib/shelf-case/rules/list'

export const permission = 'case.read'
export const metadata: Metadata = { title: 'Cases' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function CasesPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = caseList.query.parse(await searchParams)
  const found = await listCases(db, actor, query)
  const { timeZone } = await getLab(db)
  const { waiting, signed, first } = found.counts
  return (
    <>
      <Heading
        crumb="Shelf-life cases, newest first"
        headline={
          waiting === 0 ? (
            <>No case waits for a signature</>
          ) : (
            <>
              <b>{waiting === 1 ? first : waiting}</b>{' '}
              {waiting === 1 ? 'waits for a signature' : 'cases wait for a signature'}
            </>
          )
        }
        sentence={`${signed === 1 ? 'One shelf life is' : `${signed} shelf lives are`} signed and in force. A case is begun from a study’s sheet.`}
      />
      <div className="mt-5">
        <CaseList page={found} query={query} timeZone={timeZone} />
      </div>
    </>
  )
}
