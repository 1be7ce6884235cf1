'use client'

import { useRef, useState } from 'react'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { emptyLine } from '@/lib/formula/rules/arrange'
import type { FormulaTotals, PhaseTotal } from '@/lib/formula/rules/totals'
import { emulsionTypes, type EmulsionType } from '@/lib/formula/schema'
import { InsideDrawing } from './inside-drawing'
import { LineSheet } from './line-sheet'
import { ReadSheet } from './read-sheet'
import { ApartJar } from './apart-jar'
import { phaseFacts } from './formula-facts'
import { TotalRow } from './total-row'
import { useRowMiddles } from './use-row-middles'
import type { DraftHandle } from './use-draft'

type Props = {
  formula: FormulaPage
  handle: DraftHandle
  isOpen: boolean
  totals: FormulaTotals
  phases: PhaseTotal[]
  checks: FormulaCheck[]
  before: Map<string, string> | null
}

/** The jar if it all came apart, the sheet, and what is inside: the formula at a glance. */
export function LinesPart({ formula, handle, isOpen, totals, phases, checks, before }: Props) {
  const { draft, amounts, problems, change } = handle
  const [problem, setProblem] = useState('')
  const sheet = useRef<HTMLDivElement>(null)
  const beforeNumber = before ? (formula.before?.number ?? null) : null
  const foot = <TotalRow totals={totals} amounts={amounts} beforeNumber={beforeNumber} />
  const factsOfPhase = (total: PhaseTotal) => phaseFacts(amounts, total)
  const lines = draft.lines.length ? draft.lines : [emptyLine(formula.versionId, 'A', false)]
  const middles = useRowMiddles(sheet, lines.map((line) => line.id).join())
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-8 gap-y-8 xl:grid-cols-[minmax(0,1fr)_572px]">
      <div className="flex">
        <ApartJar amounts={amounts} emulsionType={draft.emulsionType} middles={middles} />
        <div ref={sheet} className="min-w-0 flex-1">
          {isOpen ? (
            <>
              <LineSheet
                lines={lines}
                emulsionType={draft.emulsionType}
                phases={phases}
                factsOfPhase={factsOfPhase}
                problems={problems}
                before={before}
                onLines={(next) => change({ lines: next })}
                onProblem={setProblem}
                foot={foot}
              />
              <div className="mt-3">
                <ErrorNote error={problem || null} />
              </div>
              <Facts handle={handle} />
            </>
          ) : (
            <ReadSheet
              lines={formula.lines}
              phases={phases}
              emulsionType={draft.emulsionType}
              factsOfPhase={factsOfPhase}
              foot={foot}
            />
          )}
        </div>
      </div>
      <InsideDrawing
        totals={totals}
        amounts={amounts}
        before={formula.before}
        checks={checks}
        emulsionType={draft.emulsionType}
      />
    </div>
  )
}

function Facts({ handle }: { handle: DraftHandle }) {
  const { draft, change, problems } = handle
  return (
    <div className="mt-6 grid gap-4 sm:grid-cols-[1fr_200px]">
      <Field label="Name" value={draft.name} error={problems.name} onText={(name) => change({ name })} />
      <Select
        label="Emulsion type"
        value={draft.emulsionType}
        error={problems.emulsionType}
        options={emulsionTypes.map((type) => ({ value: type, label: type }))}
        onPick={(type) => change({ emulsionType: type as EmulsionType })}
      />
      <Field
        label="Why this version"
        value={draft.note}
        wrap="sm:col-span-2"
        onText={(note) => change({ note })}
      />
    </div>
  )
}
