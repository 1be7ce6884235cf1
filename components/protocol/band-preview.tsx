'use client'

import { useState } from 'react'
import { NumberField } from '@/components/ui/number-field'
import { readDecimal } from '@/lib/number/rules'
import { bandText } from '@/lib/protocol/rules/words'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { toleranceBand } from '@/lib/science/band'
import { ScienceError } from '@/lib/science/guard'

const examples: Partial<Record<string, string>> = { ph: '5.5', viscosity: '60000' }

/** What the tolerance comes to on an initial that one may type; the batch's own counts. */
export function BandPreview({ planned }: { planned: PlannedAttribute }) {
  const [typed, setTyped] = useState(examples[planned.attribute] ?? '0')
  if (planned.tolerance.kind === 'range') return null
  const { label, unit } = attributeOf(planned.attribute, planned)
  return (
    <div className="mt-2 flex flex-wrap items-end gap-3 sm:ml-[132px]">
      <NumberField
        label={`If the initial is${unit ? `, ${unit}` : ''}`}
        value={typed}
        onText={setTyped}
        wrap="w-[170px]"
      />
      <p className="pb-1.5 text-15" aria-live="polite">
        {label} may be {previewed(planned, readDecimal(typed))}
      </p>
    </div>
  )
}

function previewed(planned: PlannedAttribute, initial: number | null): string {
  if (initial === null) return 'told once an initial is given.'
  try {
    return `${bandText(planned, toleranceBand(planned.tolerance, initial))}.`
  } catch (error) {
    if (error instanceof ScienceError) return 'nothing: the limits leave no room on this initial.'
    throw error
  }
}
