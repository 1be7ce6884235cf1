'use client'

import { useRouter } from 'next/navigation'
import { useEffect, useState } from 'react'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { IngredientBookQuery } from '@/lib/ingredient/schema'
import { bookAddress } from './book-address'

/** Search in every name, the phase and the function. */
export function BookFilter({ query, functions }: { query: IngredientBookQuery; functions: string[] }) {
  const router = useRouter()
  const [q, setQ] = useState(query.q)
  const go = (next: Partial<IngredientBookQuery>) =>
    router.replace(bookAddress(query, { q, ...next }), { scroll: false })
  useEffect(() => {
    if (q.trim() === query.q.trim()) return
    const timer = setTimeout(() => router.replace(bookAddress(query, { q }), { scroll: false }), 250)
    return () => clearTimeout(timer)
  }, [q, query, router])

  return (
    <form
      role="search"
      data-screen-only
      className="flex flex-wrap items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault()
        go({})
      }}
    >
      <Field
        type="search"
        label="Find an ingredient"
        hideLabel
        placeholder="INCI name, synonym, supplier’s name"
        value={q}
        onText={setQ}
        wrap="w-full sm:w-[320px]"
      />
      <Select
        label="Phase"
        hideLabel
        value={query.phase}
        options={[
          { value: 'any', label: 'Phase: any' },
          { value: 'oil', label: 'Phase: oil' },
          { value: 'water', label: 'Phase: water' },
        ]}
        onPick={(phase) => go({ phase: phase as IngredientBookQuery['phase'] })}
        wrap="min-w-[130px] flex-1 sm:w-[150px] sm:flex-none"
      />
      <Select
        label="Function"
        hideLabel
        value={query.function}
        empty="Function: any"
        options={[...new Set([...functions, ...(query.function ? [query.function] : [])])].map((one) => ({
          value: one,
          label: one,
        }))}
        onPick={(fn) => go({ function: fn })}
        wrap="min-w-[150px] flex-1 sm:w-[210px] sm:flex-none"
      />
    </form>
  )
}
