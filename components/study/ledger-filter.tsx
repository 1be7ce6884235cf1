'use client'

import { useEffect, useState } from 'react'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { studyStandings, type StudyFilter } from '@/lib/study/schema'

/** Search and standing; both stand in the address, so that a view can be shared and gone back to. */
export function LedgerFilter({
  filter,
  onChange,
}: {
  filter: StudyFilter
  onChange: (filter: StudyFilter) => void
}) {
  const [q, setQ] = useState(filter.q)
  useEffect(() => {
    if (q === filter.q) return
    const timer = setTimeout(() => onChange({ ...filter, q }), 250)
    return () => clearTimeout(timer)
  }, [q, filter, onChange])

  return (
    <form
      role="search"
      data-screen-only
      className="mt-4 flex flex-wrap items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault()
        onChange({ ...filter, q })
      }}
    >
      <Field
        type="search"
        label="Find a study"
        hideLabel
        placeholder="Batch, formula, client, jar"
        value={q}
        onText={setQ}
        wrap="w-full sm:w-[280px]"
      />
      <Select
        label="Standing"
        hideLabel
        value={filter.standing}
        options={[
          { value: 'any', label: 'Standing: any' },
          ...studyStandings.map((standing) => ({ value: standing, label: `Standing: ${standing}` })),
        ]}
        onPick={(standing) => onChange({ ...filter, q, standing: standing as StudyFilter['standing'] })}
        wrap="w-[180px]"
      />
    </form>
  )
}
