import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { CaseView } from '@/components/shelf-case/case-view'
import { may } from '@/lib/auth/permissions'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { computeFor, getCase, readingAuthors } from '@/lib/shelf-case/queries/read'
import { whyNotSign } from '@/lib/shelf-case/rules/refusals'
import { caseKey } from '@/lib/shelf-case/keys'
import { demoPassword } from '@/lib/lab/rules'

export const permission = 'case.read'

type Props = { params: Promise<{ code: string }> }

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Case ${(await params).code}` }
}

export default async function CasePage({ params }: Props) {
  const { code } = await params
  const { actor, db } = await page(permission)
  const found = await getCase(db, actor, code).catch((error: unknown) => {
    if (error instanceof AppError && error.status === 404) notFound()
    throw error
  })
  const draft = found.content
    ? null
    : (await computeFor(db, actor, found.studyId, found.studyStationId)).computed
  const authors = found.state === 'put forward' ? await readingAuthors(db, found.studyId) : []
  return (
    <SWRConfig value={{ fallback: { [caseKey(code)]: found } }}>
      <CaseView
        code={code}
        draft={draft}
        mayPutForward={may(actor, 'case.put-forward')}
        maySign={may(actor, 'case.sign')}
        whyNotSign={whyNotSign(actor.personId, {
          putForwardById: found.putForwardById,
          createdById: found.createdById,
          readingAuthors: authors,
        })}
        demoPassword={actor.isDemo ? demoPassword : null}
      />
    </SWRConfig>
  )
}
