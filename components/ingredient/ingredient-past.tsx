'use client'

import Link from 'next/link'
import useSWR from 'swr'
import { fetcher } from '@/lib/http/fetcher'
import type { IngredientPage } from '@/lib/ingredient/queries'
import { ingredientKey } from '@/lib/ingredient/keys'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'

/** Which formulas use it, and who changed it last; every earlier value is in the record. */
export function IngredientPast({ id, timeZone }: { id: string; timeZone: string }) {
  const { data } = useSWR<IngredientPage>(ingredientKey(id), fetcher)
  if (!data) return null
  const { formulas, lastChange } = data
  return (
    <div className="border-t border-hair pt-2 text-14 text-soft [&_a]:underline [&_a]:underline-offset-4">
      <p>
        {formulas.length === 0 ? 'No formula uses it yet.' : 'Used in '}
        {formulas.map((formula, index) => (
          <span key={formula.code}>
            {index > 0 ? ', ' : ''}
            <Link href={`/formulas/${formula.code}`}>{formula.code}</Link>
          </span>
        ))}
      </p>
      {lastChange ? (
        <p>
          {lastChange.operation === 'insert' ? 'Added' : 'Changed last'} by {lastChange.by},{' '}
          {spokenDay(dayIn(timeZone, lastChange.at))}.{' '}
          <Link href="/trail?what=ingredient">Every change of the book</Link>
        </p>
      ) : null}
    </div>
  )
}
