import type { Metadata } from 'next'
import Link from 'next/link'
import { NewFormulaForm } from '@/components/formula/new-formula-form'
import { Heading } from '@/components/ui/heading'
import { listClientNames } from '@/lib/formula/queries/list-client-names'
import { page } from '@/lib/http/page'

export const permission = 'formula.write'
export const metadata: Metadata = { title: 'New formula' }

export default async function NewFormulaPage() {
  const { actor, db } = await page(permission)
  const clients = await listClientNames(db, actor)
  return (
    <>
      <Heading
        crumb={<Link href="/formulas">Formulas</Link>}
        headline={
          <>
            What is it <b>called</b>, and which phase is outside
          </>
        }
        sentence="Its lines, process and batches come on the next page."
      />
      <div className="mt-8">
        <NewFormulaForm clients={clients} />
      </div>
    </>
  )
}
