'use client'

import { Button } from '@/components/ui/button'
import { LinkButton } from '@/components/ui/link-button'
import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import { percentText } from '@/lib/formula/rules/numbers'
import type { FormulaTotals } from '@/lib/formula/rules/totals'
import { NewVersion } from './new-version'
import type { DraftHandle } from './use-draft'

type Props = { formula: FormulaPage; handle: DraftHandle; totals: FormulaTotals; onSave: () => void }

export function FormulaActs({ formula, handle, totals, onSave }: Props) {
  const missing = totals.missingThousandths
  const why = handle.isDirty
    ? 'Save it first.'
    : missing !== 0
      ? `${percentText(Math.abs(missing))} % ${missing > 0 ? 'are missing' : 'too much'}.`
      : undefined
  const draft = formula.versions.find((version) => version.state === 'draft')
  return (
    <div className="flex flex-wrap items-start gap-2">
      {formula.state === 'locked' && !draft ? (
        <NewVersion formula={formula} next={(formula.versions.at(-1)?.number ?? 0) + 1} />
      ) : null}
      {handle.isDirty ? (
        <Button why="Save it first.">Vary it</Button>
      ) : (
        <LinkButton href={`/formulas/${formula.code}/variants?version=${formula.number}`}>Vary it</LinkButton>
      )}
      {why ? (
        <Button why={why}>Make a batch</Button>
      ) : (
        <LinkButton href={`/batches/new?formula=${formula.code}&version=${formula.number}`}>
          Make a batch
        </LinkButton>
      )}
      {formula.state === 'draft' ? (
        <Button kind="primary" busy={handle.isSaving} onClick={onSave}>
          Save the draft
        </Button>
      ) : null}
    </div>
  )
}
