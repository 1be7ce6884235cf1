import type { Metadata } from 'next'
import Link from 'next/link'
import { notFound } from 'next/navigation'
import { FamilyPart } from '@/components/formula/family-part'
import { VariantsForm } from '@/components/formula/variants-form'
import { Heading } from '@/components/ui/heading'
import { getFormula } from '@/lib/formula/queries/get-formula'
import { listTakenCodes } from '@/lib/formula/queries/list-taken-codes'
import { formulaPageQuery } from '@/lib/formula/schema'
import { AppError } from '@/lib/http/errors'
import { page } from '@/lib/http/page'
import { readSegment } from '@/lib/address/rules'

export const permission = 'formula.write'
export const metadata: Metadata = { title: 'A family of variants' }

type Props = {
  params: Promise<{ code: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function VariantsPage({ params, searchParams }: Props) {
  const { actor, db } = await page(permission)
  const code = readSegment((await params).code)
  const { version } = formulaPageQuery.parse(await searchParams)
  const formula = await getFormula(db, actor, code, version).catch((thrown: unknown) => {
    if (thrown instanceof AppError && thrown.status === 404) notFound()
    throw thrown
  })
  const taken = await listTakenCodes(db, actor, code)
  return (
    <>
      <Heading
        crumb={
          <>
            <Link href="/formulas">Formulas</Link> ·{' '}
            <Link href={`/formulas/${code}?version=${formula.number}`}>
              {code}, version {formula.number}
            </Link>
            , {formula.name}
          </>
        }
        headline={
          <>
            One base, <b>up to twelve variants</b> of it
          </>
        }
        sentence="One or two ingredients take the levels you give; the q.s. to 100 line makes up the rest. Each becomes a formula with a draft of its own."
      />
      <VariantsForm
        base={{
          code,
          name: formula.name,
          number: formula.number,
          versionId: formula.versionId,
          lines: formula.lines,
        }}
        taken={taken}
      />
      {formula.families.map((family) => (
        <FamilyPart key={family.members[0]?.code} family={family} code={code} mayMake />
      ))}
    </>
  )
}
