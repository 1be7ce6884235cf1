import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { SWRConfig } from 'swr'
import { FormulaView, type FormulaPart } from '@/components/formula/formula-view'
import { may } from '@/lib/auth/permissions'
import { getFormula } from '@/lib/formula/queries/get-formula'
import { formulaKey } from '@/lib/formula/keys'
import { formulaPageQuery } from '@/lib/formula/schema'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'formula.read'

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

const parts: FormulaPart[] = ['lines', 'process', 'batches', 'versions']

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: readSegment((await params).code) }
}

export default async function FormulaPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const query = await searchParams
  const { version } = formulaPageQuery.parse(query)
  const formula = await getFormula(db, actor, code, version).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
  return (
    <SWRConfig value={{ fallback: { [formulaKey(code, version)]: formula } }}>
      <FormulaView
        code={code}
        number={version}
        part={parts.find((part) => part === query['part']) ?? 'lines'}
        mayWrite={may(actor, 'formula.write')}
      />
    </SWRConfig>
  )
}
