'use client'

import { useCallback, useRef, useState } from 'react'
import { ErrorNote } from '@/components/ui/error-note'
import { Field } from '@/components/ui/field'
import { Select } from '@/components/ui/select'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { emptyLine } from '@/lib/formula/rules/arrange'
import type { FormulaTotals, PhaseTotal } from '@/lib/formula/rules/totals'
import type { TypedLine } from '@/lib/formula/rules/typed'
import { emulsionTypes, type EmulsionType } from '@/lib/formula/schema'
import { Checks } from './checks'
import { InsideDrawing } from './inside-drawing'
import { FamilyPart } from './family-part'
import { LineSheet, type ChangeLines } from './line-sheet'
import { MeasuredHow } from './measured-how'
import { ReadSheet } from './read-sheet'
import { ApartJar } from './apart-jar'
import { phaseFacts } from './formula-facts'
import { TotalRow } from './total-row'
import { TwiceNote } from './twice-note'
import { useRowMiddles } from './use-row-middles'
import type { DraftHandle } from './use-draft'

type Props = {
  formula: FormulaPage
  handle: DraftHandle
  mayWrite: boolean
  isOpen: boolean
  totals: FormulaTotals
  phases: PhaseTotal[]
  checks: FormulaCheck[]
  before: Map<string, string> | null
}

/** The jar if it all came apart, the sheet, and what is inside: the formula at a glance. */
export function LinesPart({ formula, handle, mayWrite, isOpen, totals, phases, checks, before }: Props) {
  const { draft, amounts, problems, change } = handle
  const [problem, setProblem] = useState('')
  const [told, setTold] = useState<string[]>([])
  const sheet = useRef<HTMLDivElement>(null)
  const beforeNumber = before ? (formula.before?.number ?? null) : null
  const foot = (
    <TotalRow
      totals={totals}
      amounts={amounts}
      emulsionType={draft.emulsionType}
      beforeNumber={beforeNumber}
    />
  )
  const factsOfPhase = (total: PhaseTotal) => phaseFacts(amounts, total)
  const { versionId } = formula
  const lines = orFirst(draft.lines, versionId)
  const onLines: ChangeLines = useCallback(
    (next, at) => change((now) => ({ lines: next(orFirst(now.lines, versionId)) }), at),
    [change, versionId],
  )
  const middles = useRowMiddles(sheet, lines.map((line) => line.id).join())
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-8 gap-y-8 xl:grid-cols-[minmax(0,1fr)_572px] xl:grid-rows-[auto_1fr]">
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
                onLines={onLines}
                onProblem={setProblem}
                onTold={setTold}
                undo={handle.undo}
                foot={foot}
              />
              <div className="mt-3">
                <ErrorNote error={problem || null} />
              </div>
              <PastedNote told={told} onSeen={() => setTold([])} />
              <TwiceNote lines={lines} onLines={onLines} />
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
          <MeasuredHow type={draft.emulsionType} />
          {formula.families.map((family) => (
            <FamilyPart
              key={family.members[0]?.code}
              family={family}
              code={formula.code}
              mayMake={mayWrite && !handle.isDirty}
            />
          ))}
        </div>
      </div>
      <InsideDrawing
        totals={totals}
        amounts={amounts}
        before={formula.before}
        drops={formula.drops}
        checks={checks}
        emulsionType={draft.emulsionType}
        number={formula.number}
      />
      <Checks
        number={formula.number}
        checks={checks.filter((check) => check.at === null || totals.internalVolumePercent === null)}
        className="min-w-0 gap-x-8 sm:columns-2 lg:pl-[120px] xl:col-start-1 xl:row-start-2 [&>li]:mb-4"
      />
    </div>
  )
}

/** Which names of a pasted block the book has under another one; it stays until it was read. */
function PastedNote({ told, onSeen }: { told: string[]; onSeen: () => void }) {
  return (
    <div role="status" className="mt-3 empty:hidden">
      {told.length ? (
        <div className="border-l-4 border-ink py-0.5 pl-3">
          <ul>
            {told.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
          <button type="button" className="font-650 underline underline-offset-4" onClick={onSeen}>
            Seen
          </button>
        </div>
      ) : null}
    </div>
  )
}

/** A sheet has a first line to type in. */
function orFirst(lines: TypedLine[], versionId: string): TypedLine[] {
  return lines.length ? lines : [emptyLine(versionId, 'A', false)]
}

function Facts({ handle }: { handle: DraftHandle }) {
  const { draft, change, problems } = handle
  return (
    <div className="mt-6 grid gap-4 sm:grid-cols-[1fr_200px_180px]">
      <Field
        label="Name"
        value={draft.name}
        error={problems.name}
        onText={(name) => change(() => ({ name }), 'name')}
      />
      <Select
        label="Emulsion type"
        value={draft.emulsionType}
        error={problems.emulsionType}
        options={emulsionTypes.map((type) => ({ value: type, label: type }))}
        onPick={(type) => change(() => ({ emulsionType: type as EmulsionType }))}
      />
      <Field
        label="Target pH"
        value={draft.targetPh}
        error={problems.targetPh}
        hint="5.50, or 5.20 to 5.80."
        inputMode="decimal"
        onText={(targetPh) => change(() => ({ targetPh }), 'targetPh')}
      />
      <Field
        label="Why this version"
        value={draft.note}
        wrap="sm:col-span-3"
        onText={(note) => change(() => ({ note }), 'note')}
      />
    </div>
  )
}
