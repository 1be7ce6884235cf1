'use client'

import { innerWord } from '@/lib/formula/rules/finding'
import { percentText } from '@/lib/formula/rules/numbers'
import type { PhaseTotal } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import type { FigureFacts } from '@/lib/science/methods/method'
import { FigureDetails } from '@/components/ui/figure-details'

type Props = {
  phase: string
  total: PhaseTotal | undefined
  isInternal: boolean
  emulsionType: EmulsionType
  factsOfPhase: (total: PhaseTotal) => FigureFacts
  onAdd?: () => void
}

/** The head of a phase: what it is, its share of the volume, its share by mass. */
export function PhaseRow({ phase, total, isInternal, emulsionType, factsOfPhase, onAdd }: Props) {
  const inner = innerWord(emulsionType)
  const outer = emulsionType === 'water-in-silicone' ? 'silicone' : inner === 'water' ? 'oil' : 'water'
  return (
    <tr className="bg-recess">
      <th scope="rowgroup" colSpan={3} className="h-9 px-2 text-left font-430">
        <b className="mr-2 font-750">{phase}</b>
        {isInternal ? `${inner}, inside` : `${outer}, outside`}
        {total ? (
          <>
            :{' '}
            <FigureDetails figure={`${total.volumePercent.toFixed(1)} %`} facts={() => factsOfPhase(total)} />{' '}
            of the volume
          </>
        ) : null}
      </th>
      <td className="px-2 text-right text-16 font-750">
        {total ? percentText(total.percentThousandths) : ''}
      </td>
      <td colSpan={4} className="pr-1 text-right">
        {onAdd ? (
          <button type="button" onClick={onAdd} className="h-8 px-1 text-14 underline underline-offset-4">
            Add line<span className="sr-only"> to phase {phase}</span>
          </button>
        ) : null}
      </td>
    </tr>
  )
}
