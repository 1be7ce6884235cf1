'use client'

import type { FormulaCheck } from '@/lib/formula/rules/checks'
import type { FormulaStep } from '@/lib/formula/schema'
import { Checks } from './checks'
import { ReadSteps } from './read-steps'
import { StepSheet } from './step-sheet'
import type { DraftHandle } from './use-draft'

type Props = { handle: DraftHandle; isOpen: boolean; steps: FormulaStep[]; checks: FormulaCheck[] }

export function ProcessPart({ handle, isOpen, steps, checks }: Props) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_300px]">
      {isOpen ? (
        <StepSheet
          steps={handle.draft.steps}
          problems={handle.problems}
          onSteps={(next) => handle.change({ steps: next })}
        />
      ) : (
        <ReadSteps steps={steps} />
      )}
      <Checks checks={checks} />
    </div>
  )
}
