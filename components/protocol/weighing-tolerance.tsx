'use client'

import { useState } from 'react'
import { NumberField } from '@/components/ui/number-field'
import { usualWeighingTolerancePercent } from '@/lib/lab/rules'
import { readDecimal } from '@/lib/number/rules'
import type { ProtocolPlan } from '@/lib/protocol/schema'

type Props = {
  plan: ProtocolPlan
  onSet: (change: Pick<ProtocolPlan, 'weighingTolerancePercent'>) => void
  error?: string
}

/** How near each line of a batch made for this protocol is weighed; empty leaves it to the lab. */
export function WeighingTolerance({ plan, onSet, error }: Props) {
  const [text, setText] = useState(String(plan.weighingTolerancePercent ?? ''))
  return (
    <NumberField
      label="Weighing tolerance, %"
      value={text}
      placeholder={String(usualWeighingTolerancePercent)}
      error={
        error ?? (text.trim() && readDecimal(text) === null ? 'Type it as a number, such as 0.5.' : undefined)
      }
      onText={(typed, number) => {
        setText(typed)
        onSet({ weighingTolerancePercent: number ?? undefined })
      }}
      wrap="w-[180px]"
    />
  )
}
