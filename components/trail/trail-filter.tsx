'use client'

import { useRouter } from 'next/navigation'
import { useState, type FormEvent } from 'react'
import { Button } from '@/components/ui/button'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import { capital } from '@/lib/study/rules/words'
import { trailAddress, type ShownTrail } from './trail-address'
import { tableWords } from './trail-words'

/** Which entries: of one kind, of one study. Both stand in the address. */
export function TrailFilter({ shown, isStudyKnown }: { shown: ShownTrail; isStudyKnown: boolean }) {
  const router = useRouter()
  const [study, setStudy] = useState(shown.study ?? '')
  const go = (next: Partial<ShownTrail>) => router.push(trailAddress({ ...shown, before: null, ...next }))

  function submit(event: FormEvent) {
    event.preventDefault()
    go({ study: study.trim() || null })
  }

  return (
    <form role="search" onSubmit={submit} data-screen-only className="mt-4 flex flex-wrap items-start gap-3">
      <Select
        label="What was written"
        hideLabel
        value={shown.table ?? ''}
        empty="What: anything"
        options={Object.entries(tableWords).map(([value, label]) => ({ value, label: capital(label) }))}
        onPick={(table) => go({ table: table || null, study: study.trim() || null })}
        wrap="w-full sm:w-[260px]"
      />
      <Field
        label="Study"
        hideLabel
        placeholder="Study, as S-004"
        value={study}
        onText={setStudy}
        error={isStudyKnown ? undefined : `There is no study ${shown.study}. Write its code as S-004.`}
        wrap="w-full sm:w-[240px]"
      />
      <Button type="submit">Show</Button>
    </form>
  )
}
