import type { Metadata } from 'next'
import { FormulaList } from '@/components/formula/formula-list'
import { ListSearch } from '@/components/formula/list-search'
import { Heading } from '@/components/ui/heading'
import { LinkButton } from '@/components/ui/link-button'
import { may } from '@/lib/auth/permissions'
import { listFormulas } from '@/lib/formula/queries/list-formulas'
import { formulaListQuery } from '@/lib/formula/schema'
import { page } from '@/lib/http/page'

export const permission = 'formula.read'
export const metadata: Metadata = { title: 'Formulas' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function FormulasPage({ searchParams }: Props) {
  const { actor, db } = await page(permission)
  const query = formulaListQuery.parse(await searchParams)
  const formulas = await listFormulas(db, actor, query)
  const mayWrite = may(actor, 'formula.write')
  const high = formulas.filter((formula) => formula.isHighInternalPhase).length
  const drafts = formulas.filter((formula) => formula.state === 'draft').length
  return (
    <>
      <Heading
        crumb={query.q ? `Formulas with ${query.q}` : 'Formulas'}
        headline={
          formulas.length ? (
            <>
              <b>
                {high} of {formulas.length}
              </b>{' '}
              {formulas.length === 1 ? 'formula is' : 'formulas are'} past the closest packing
            </>
          ) : (
            <>Nothing to weigh yet</>
          )
        }
        sentence={
          formulas.length
            ? `More than 74.0 % inside, by volume. ${drafts === 1 ? 'One is' : `${drafts} are`} still a draft.`
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
      <div className="mt-6">
        <ListSearch
          action="/formulas"
          label="Find a formula"
          placeholder="Code, name, type or INCI name"
          q={query.q}
          kept={{ sort: query.sort, order: query.order }}
        />
      </div>
      <div className="mt-4">
        <FormulaList formulas={formulas} query={query} mayWrite={mayWrite} />
      </div>
    </>
  )
}
