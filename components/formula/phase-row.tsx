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
  /** Where the lines are written: how many of them are marked as inside, and what the phase itself can be told. */
  writing?: { inside: 'all' | 'some' | 'none'; onInside: (isInternal: boolean) => void; onAdd: () => void }
}

/** The head of a phase: what it is, its share of the volume, its share by mass. */
export function PhaseRow({ phase, total, isInternal, emulsionType, factsOfPhase, writing }: Props) {
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
      <td colSpan={2} />
      <td className="text-center">
        {writing ? (
          <input
            type="checkbox"
            aria-label={`All of phase ${phase} is in the internal phase`}
            title={`All of phase ${phase}`}
            checked={writing.inside === 'all'}
            ref={(box) => {
              if (box) box.indeterminate = writing.inside === 'some'
            }}
            onChange={(event) => writing.onInside(event.target.checked)}
            className="tick align-middle"
          />
        ) : null}
      </td>
      <td className="pr-1 text-right">
        {writing ? (
          <button
            type="button"
            onClick={writing.onAdd}
            className="h-8 px-1 text-14 underline underline-offset-4"
          >
            Add line<span className="sr-only"> to phase {phase}</span>
          </button>
        ) : null}
      </td>
    </tr>
  )
}
