import type { Metadata } from 'next'
import { FormulaList } from '@/components/formula/formula-list'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { may } from '@/lib/auth/permissions'
import { listFormulas } from '@/lib/formula/queries/list-formulas'
import { formulaList } from '@/lib/formula/rules/list'
import { grouped } from '@/lib/number/rules'
import { page } from '@/lib/http/page'
import { getLab } from '@/lib/lab/queries'

export const permission = 'formula.read'
export const metadata: Metadata = { title: 'Formulas' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function FormulasPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = formulaList.query.parse(await searchParams)
  const found = await listFormulas(db, actor, query)
  const { timeZone } = await getLab(db)
  const { all, high, drafts } = found.counts
  const mayWrite = may(actor, 'formula.write')
  return (
    <>
      <Heading
        crumb={query.q ? `Formulas with ${query.q}` : 'Formulas'}
        headline={
          all ? (
            <>
              <b>
                {grouped(high, 0)} of {grouped(all, 0)}
              </b>{' '}
              {all === 1 ? 'formula is' : 'formulas are'} past the closest packing
            </>
          ) : (
            <>Nothing to weigh yet</>
          )
        }
        sentence={
          all
            ? `More than 74.0 % inside, by volume. ${drafts === 0 ? 'None is' : drafts === 1 ? 'One is' : `${grouped(drafts, 0)} are`} still a draft.`
            : undefined
        }
        acts={
          mayWrite ? (
            <LinkButton href="/formulas/new" kind="primary">
              Write a formula
            </LinkButton>
          ) : undefined
        }
      />
      <div className="mt-5">
        <FormulaList page={found} query={query} mayWrite={mayWrite} timeZone={timeZone} />
      </div>
    </>
  )
}
