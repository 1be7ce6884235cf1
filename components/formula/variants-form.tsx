'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { capital, numberWord } from '@/lib/study/rules/words'
import { ErrorNote } from '@/components/ui/error-note'
import { toast } from '@/components/ui/toast'
import { newId } from '@/lib/db/id'
import { noRemainderSentence } from '@/lib/formula/rules/variants'
import type { FormulaLine } from '@/lib/formula/schema'
import { ClientError, send } from '@/lib/http/fetcher'
import { VariantRows } from './variant-rows'
import { noTyped, planFamily, type TypedFamily } from './variant-plan'
import { VaryFields } from './vary-fields'

export type FamilyBase = {
  code: string
  name: string
  number: number
  versionId: string
  lines: FormulaLine[]
}

type Props = { base: FamilyBase; taken: string[] }

/** The levels, and under them what they come to: every member with its code, its q.s. share, its inside and cost. */
export function VariantsForm({ base, taken }: Props) {
  const router = useRouter()
  const [ids] = useState(() => Array.from({ length: 12 }, () => ({ id: newId(), versionId: newId() })))
  const [typed, setTyped] = useState<TypedFamily>(noTyped)
  const [refusal, setRefusal] = useState<ClientError | null>(null)
  const [isSending, setIsSending] = useState(false)
  const set = (change: Partial<TypedFamily>) => {
    setRefusal(null)
    setTyped((now) => ({ ...now, ...change }))
  }
  if (!base.lines.some((line) => line.isRemainder)) {
    return (
      <div className="mt-6">
        <ErrorNote error={noRemainderSentence(base.code, base.number)} />
      </div>
    )
  }
  const plan = planFamily(base, typed, taken, refusalFields(refusal))

  async function make() {
    setIsSending(true)
    setRefusal(null)
    try {
      const url = `/api/formulas/${encodeURIComponent(base.code)}/variants`
      const made = await send<{ code: string }[]>(url, 'POST', {
        fromVersionId: base.versionId,
        lineIds: plan.lineIds,
        members: plan.members.map(({ code, name, shares }, index) => ({ ...ids[index], code, name, shares })),
      })
      const count = made.length
      toast(`${capital(numberWord(count))} ${count === 1 ? 'formula is' : 'formulas are'} made.`)
      router.push(`/formulas/${made[0]?.code ?? base.code}`)
    } catch (thrown) {
      setIsSending(false)
      if (!(thrown instanceof ClientError)) throw thrown
      setRefusal(thrown)
    }
  }

  const count = plan.members.length
  return (
    <form
      className="mt-8 flex flex-col gap-6"
      onSubmit={(event) => {
        event.preventDefault()
        if (!plan.why && !isSending) void make()
      }}
    >
      <VaryFields base={base} typed={typed} errors={plan.errors} onSet={set} />
      {count > 0 ? <VariantRows plan={plan} base={base} onSet={set} typed={typed} /> : null}
      <ErrorNote error={refusal} />
      <div className="flex flex-wrap items-start gap-2">
        <Button type="submit" kind="primary" busy={isSending} why={plan.why ?? undefined}>
          {count > 0
            ? `Make ${numberWord(count)} ${count === 1 ? 'formula' : 'formulas'}`
            : 'Make the family'}
        </Button>
      </div>
    </form>
  )
}

/** A code that is taken comes as detail, everything else as fields. */
function refusalFields(refusal: ClientError | null): Record<string, string> {
  const detail = refusal?.detail as { fields?: Record<string, string> } | undefined
  return { ...refusal?.fields, ...detail?.fields }
}
