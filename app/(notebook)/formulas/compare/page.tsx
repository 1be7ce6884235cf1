import type { Metadata } from 'next'
import Link from 'next/link'
import { ComparisonView } from '@/components/formula/comparison-view'
import { Empty } from '@/components/ui/empty'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { may } from '@/lib/auth/permissions'
import { getComparison } from '@/lib/formula/queries/get-comparison'
import { compareQuery } from '@/lib/formula/schema'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'

export const permission = 'formula.read'
export const metadata: Metadata = { title: 'Which prototype stands where' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function ComparePage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const { code } = compareQuery.parse(await searchParams)
  const found = await getComparison(db, actor, code).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 422) return thrown
    throw thrown
  })
  if (found instanceof AppError || found.formulas.length === 0) {
    const sentence =
      found instanceof AppError
        ? found.sentence
        : found.missing.length
          ? `There is no formula ${found.missing.join(', ')}.`
          : 'Tick some in the list of formulas, at most twelve.'
    return (
      <>
        <Heading
          crumb={<Link href="/formulas">Formulas</Link>}
          headline={
            found instanceof AppError ? <>Too many to see at once</> : <>Nothing is picked to compare</>
          }
        />
        <Empty
          title="They would stand here beside each other"
          sentence={sentence}
          act={<LinkButton href="/formulas">Pick in the list</LinkButton>}
        />
      </>
    )
  }
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/formulas">Formulas</Link> · {found.formulas.map((one) => one.code).join(', ')}
          </>
        }
        headline={
          <>
            <b>{found.finding.strong}</b>
            {found.finding.rest}
          </>
        }
        sentence={
          <>
            {found.finding.sentence}
            {found.missing.length ? ` There is no formula ${found.missing.join(', ')}.` : null}
          </>
        }
      />
      <ComparisonView page={found} mayWrite={may(actor, 'formula.write')} />
    </>
  )
}
