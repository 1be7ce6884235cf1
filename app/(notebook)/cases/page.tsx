import type { Metadata } from 'next'
import { CaseList } from '@/components/shelf-case/case-list'
import { Heading } from '@/components/ui/heading'
import { page } from '@/lib/http/page'
import { listCases } from '@/lib/shelf-case/queries/read'

export const permission = 'case.read'
export const metadata: Metadata = { title: 'Cases' }

export default async function CasesPage() {
  const { actor, db } = await page(permission)
  const cases = await listCases(db, actor)
  const waiting = cases.filter((c) => c.state === 'put forward')
  const signed = cases.filter((c) => c.state === 'signed')
  return (
    <>
      <Heading
        crumb="Shelf-life cases, newest first"
        headline={
          waiting.length === 0 ? (
            <>No case waits for a signature</>
          ) : (
            <>
              <b>{waiting.length === 1 ? waiting[0]?.code : waiting.length}</b>{' '}
              {waiting.length === 1 ? 'waits for a signature' : 'cases wait for a signature'}
            </>
          )
        }
        sentence={`${signed.length === 1 ? 'One shelf life is' : `${signed.length} shelf lives are`} signed and in force. A case is begun from a study’s sheet.`}
      />
      <div className="mt-8">
        <CaseList cases={cases} />
      </div>
    </>
  )
}
