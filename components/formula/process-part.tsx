'use client'

import { useCallback } from 'react'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import type { FormulaStep } from '@/lib/formula/schema'
import { Checks } from './checks'
import { ReadSteps } from './read-steps'
import { StepSheet, type ChangeSteps } from './step-sheet'
import type { DraftHandle } from './use-draft'

type Props = {
  handle: DraftHandle
  code: string
  number: number
  isOpen: boolean
  steps: FormulaStep[]
  checks: FormulaCheck[]
}

export function ProcessPart({ handle, code, number, isOpen, steps, checks }: Props) {
  const { change } = handle
  const onSteps: ChangeSteps = useCallback(
    (next, at) => change((now) => ({ steps: next(now.steps) }), at),
    [change],
  )
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_300px]">
      {isOpen ? (
        <StepSheet
          code={code}
          steps={handle.draft.steps}
          problems={handle.problems}
          onSteps={onSteps}
          undo={handle.undo}
        />
      ) : (
        <ReadSteps steps={steps} />
      )}
      <Checks checks={checks} number={number} />
    </div>
  )
}
