'use client'

import Link from 'next/link'
import { useEffect, useEffectEvent, useMemo } from 'react'
import type { Drafts } from '@/components/device/drafts'
import { Heading } from '@/components/ui/heading'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { formulaFinding } from '@/lib/formula/rules/finding'
import { percentText } from '@/lib/formula/rules/numbers'
import { formulaTotals, phaseTotals } from '@/lib/formula/rules/totals'
import { readStep } from '@/lib/formula/rules/typed'
import { toast } from '@/components/ui/toast'
import { ChecksRoom } from './checks-room'
import type { Draft } from './read-draft'
import { DraftBar } from './draft-bar'
import { FormulaActs } from './formula-acts'
import { LinesPart } from './lines-part'
import { MadePart } from './made-part'
import { ProcessPart } from './process-part'
import { useChecks } from './use-checks'
import { useDraft } from './use-draft'
import { VersionsPart } from './versions-part'
import type { FormulaPart } from './formula-view'

type Props = {
  formula: FormulaPage
  part: FormulaPart
  mayWrite: boolean
  drafts: Drafts | null
  onReload: () => void
  onSaved: () => void
}

export function FormulaEditor({ formula, part, mayWrite, drafts, onReload, onSaved }: Props) {
  const handle = useDraft(formula, drafts)
  const { draft, amounts } = handle
  const isOpen = mayWrite && formula.state === 'draft'
  const totals = useMemo(() => formulaTotals(amounts), [amounts])
  const steps = useMemo(() => draft.steps.flatMap((typed) => readStep(typed).step ?? []), [draft.steps])
  const checks = useChecks(formula, draft, steps)
  const finding = formulaFinding(draft.emulsionType, totals, checks, formula.drops?.diameterUm)
  const before = formula.before
    ? new Map(
        formula.before.lines.map((line) => [
          line.inciName.toLowerCase(),
          percentText(line.percentThousandths),
        ]),
      )
    : null

  async function save() {
    if (await handle.save()) {
      toast(`Version ${formula.number} of ${formula.code} is saved.`)
      onSaved()
    }
  }

  const onKey = useEffectEvent((event: KeyboardEvent) => {
    if (!isOpen || !(event.ctrlKey || event.metaKey) || event.altKey) return
    // A dialog over the page has its own fields.
    if (event.target instanceof Element && event.target.closest('[role="dialog"]')) return
    const key = event.key.toLowerCase()
    const act =
      key === 's'
        ? () => void save()
        : key === 'y' || (key === 'z' && event.shiftKey)
          ? handle.undo.doAgain
          : key === 'z'
            ? handle.undo.takeBack
            : null
    if (!act) return
    event.preventDefault()
    act()
  })
  useEffect(() => {
    const listen = (event: KeyboardEvent) => onKey(event)
    document.addEventListener('keydown', listen)
    return () => document.removeEventListener('keydown', listen)
  }, [])

  return (
    <div>
      <Heading
        crumb={<Crumb formula={formula} draft={draft} />}
        headline={
          <>
            <b>{finding.strong}</b>
            {finding.rest}
          </>
        }
        sentence={finding.sentence}
        tabs={tabsOf(formula, part)}
        tabsLabel="Parts of this formula"
        acts={
          mayWrite ? (
            <FormulaActs formula={formula} handle={handle} totals={totals} onSave={() => void save()} />
          ) : undefined
        }
      />
      <DraftBar formula={formula} handle={handle} onReload={onReload} onSaved={onSaved} />
      <ChecksRoom
        formula={formula}
        checks={checks}
        mayWrite={mayWrite}
        isDirty={handle.isDirty}
        onAnswered={onSaved}
      >
        <div className="mt-6">
          {part === 'lines' ? (
            <LinesPart
              formula={formula}
              handle={handle}
              mayWrite={mayWrite}
              isOpen={isOpen}
              totals={totals}
              phases={phaseTotals(amounts)}
              checks={checks}
              before={before}
            />
          ) : null}
          {part === 'process' ? (
            <ProcessPart {...{ handle, isOpen, steps, checks }} code={formula.code} number={formula.number} />
          ) : null}
          {part === 'batches' ? <MadePart formula={formula} /> : null}
          {part === 'versions' ? <VersionsPart formula={formula} /> : null}
        </div>
      </ChecksRoom>
    </div>
  )
}

function Crumb({ formula, draft }: { formula: FormulaPage; draft: Draft }) {
  const { name, emulsionType, targetPh } = draft
  const made = formula.versions.filter((version) => version.batchCodes.length).at(-1)
  return (
    <>
      <Link href="/formulas">Formulas</Link> · <b className="font-650 text-ink">{formula.code}</b>, {name},{' '}
      {emulsionType}
      {targetPh.trim() ? `, target pH ${targetPh.trim()}` : ''}. Version {formula.number},{' '}
      {formula.state === 'draft' ? `a draft by ${formula.createdBy}` : 'locked'}
      {made ? `; version ${made.number} was made as batch ${made.batchCodes.at(-1)}` : ''}
    </>
  )
}

function tabsOf(formula: FormulaPage, part: FormulaPart) {
  const version = formula.number === formula.versions.at(-1)?.number ? '' : `&version=${formula.number}`
  const tab = (key: FormulaPart, label: string, count?: number) => ({
    href: `/formulas/${formula.code}?part=${key}${version}`,
    label,
    isHere: key === part,
    count,
  })
  return [
    tab('lines', 'Lines'),
    tab('process', 'Process', formula.steps.length),
    tab('batches', 'Batches', formula.batches.length),
    tab('versions', 'Versions', formula.versions.length),
  ]
}
