import type { Metadata } from 'next'
import Link from 'next/link'
import { notFound } from 'next/navigation'
import { DifferencePick } from '@/components/formula/difference-pick'
import { DifferenceView } from '@/components/formula/difference-view'
import { Heading } from '@/components/ui/heading'
import { getDifference } from '@/lib/formula/queries/get-difference'
import { differenceFinding } from '@/lib/formula/rules/difference'
import { innerWord } from '@/lib/formula/rules/finding'
import { differenceQuery } from '@/lib/formula/schema'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'formula.read'
export const metadata: Metadata = { title: 'Difference of two versions' }

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function DifferencePage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const query = differenceQuery.parse(await searchParams)
  const found = await getDifference(db, actor, code, query).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) return thrown
    throw thrown
  })
  // Another formula's code is typed by hand: what is wrong with it is said here. One without this formula is none.
  const isTyped = Boolean(query.with) && query.with !== code
  if (found instanceof AppError && !isTyped) notFound()
  if (found instanceof AppError) {
    return (
      <>
        <Heading
          crumb={<Link href={`/formulas/${code}`}>{code}</Link>}
          headline={<>Nothing to put beside it</>}
          sentence={found.sentence}
        />
        <div className="mt-6">
          <DifferencePick code={code} from={query.from} to={query.to} other={query.with ?? ''} />
        </div>
      </>
    )
  }
  const { from, to } = found
  const finding = differenceFinding(found.difference, innerWord(to.emulsionType))
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/formulas">Formulas</Link> ·{' '}
            <Link href={`/formulas/${from.code}?version=${from.number}`}>
              {from.code}, version {from.number}
            </Link>{' '}
            against{' '}
            <Link href={`/formulas/${to.code}?version=${to.number}`}>
              {to.code}, version {to.number}
            </Link>
          </>
        }
        headline={
          <>
            <b>{finding.strong}</b>
            {finding.rest}
          </>
        }
        sentence={finding.sentence}
      />
      <div className="mt-6">
        <DifferencePick
          key={`${from.code} ${from.number} ${to.code} ${to.number}`}
          code={code}
          from={from.number}
          to={to.number}
          other={to.code === code ? '' : to.code}
          numbers={found.numbers}
          otherNumbers={found.otherNumbers}
        />
      </div>
      <DifferenceView page={found} />
    </>
  )
}
