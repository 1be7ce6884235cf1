import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { CarryTable } from '@/components/shelf-case/carry-table'
import { CaseForm } from '@/components/shelf-case/case-form'
import { HowFar } from '@/components/shelf-case/how-far'
import { Weakens } from '@/components/shelf-case/weakens'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { Section } from '@/components/ui/section'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { computeFor, findStudyForCase } from '@/lib/shelf-case/queries/read'
import { dayText } from '@/lib/report/rules'

export const permission = 'case.put-forward'
export const metadata: Metadata = { title: 'New case' }

type Props = { searchParams: Promise<{ study?: string | string[] }> }

export default async function NewCasePage({ searchParams }: Props) {
  const { study } = await searchParams
  const { actor, db } = await page(permission)
  const found = typeof study === 'string' ? await findStudyForCase(db, study) : null
  if (!found) notFound()
  const basis = await computeFor(db, actor, found.id, null).catch((error: unknown) => {
    if (error instanceof AppError && error.status === 409) return error
    throw error
  })
  if (basis instanceof AppError)
    return (
      <Empty
        title={`Study ${found.code} cannot carry a shelf life`}
        sentence={basis.sentence}
        act={<LinkButton href={`/studies/${found.code}`}>Back to the sheet</LinkButton>}
      />
    )
  const { computed } = basis
  const months = computed.supportedMonths
  return (
    <>
      <Heading
        crumb={
          <>
            New case on study <a href={`/studies/${found.code}`}>{found.code}</a>, {found.title}, begun{' '}
            {dayText(found.startedOn)}
          </>
        }
        headline={
          months > 0 ? (
            <>
              The readings at <b>{computed.station.temperatureC} °C</b> carry{' '}
              <b>
                {months} {months === 1 ? 'month' : 'months'}
              </b>
            </>
          ) : (
            <>The readings carry no whole month yet</>
          )
        }
        sentence={
          months > 0
            ? 'The least over all attributes, whole months, with the cap of ICH Q1E. Fewer may be proposed, never more.'
            : 'A provisional case by the lab’s own written rule is still possible; it is never shown as statistics.'
        }
      />
      <div className="mt-6 grid grid-cols-1 gap-x-14 gap-y-8 lg:grid-cols-[minmax(0,1fr)_332px]">
        <div className="flex min-w-0 flex-col gap-8">
          <HowFar content={computed} months={months} />
          <CarryTable content={computed} when="Not begun yet, computed as it is shown." />
          <Section title="What weakens it">
            <Weakens weakens={computed.weakens} />
          </Section>
        </div>
        <aside className="min-w-0 border-2 border-ink p-4">
          <h2 className="mb-3 text-20 font-650">Your proposal</h2>
          <CaseForm
            supportedMonths={months}
            target={{ studyId: found.id, studyStationId: basis.studyStationId }}
            initial={{
              kind: months > 0 ? 'real time' : 'provisional',
              proposedMonths: months > 0 ? String(months) : '',
              storageStatement: `closed, at or below ${computed.station.temperatureC} °C`,
              whyFewer: '',
              provisionalRule: '',
              reviewOn: '',
              periodAfterOpeningMonths: '',
              periodAfterOpeningEvidence: '',
            }}
          />
        </aside>
      </div>
    </>
  )
}
