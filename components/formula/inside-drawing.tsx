import type { FormulaPage } from '@/lib/formula/queries/get-formula'
import type { FormulaCheck } from '@/lib/formula/rules/checks'
import { formulaTotals, type FormulaTotals } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import { Checks } from './checks'
import { InsideRuler } from './inside-ruler'

type Props = {
  totals: FormulaTotals
  before: FormulaPage['before']
  checks: FormulaCheck[]
  emulsionType: EmulsionType
}

/** What is inside: the level, a cut through the emulsion to scale, and the questions to the formula. */
export function InsideDrawing({ totals, before, checks }: Props) {
  const was = before ? formulaTotals(before.lines).internalVolumePercent : null
  return (
    <div className="min-w-0">
      <InsideRuler
        percent={totals.internalVolumePercent}
        before={before && was !== null ? { number: before.number, percent: was } : null}
      />
      <p className="mt-1 text-14 text-soft">
        {totals.internalMassPercent === null
          ? 'The internal phase shows here as soon as a line has its share and density.'
          : `${totals.internalMassPercent.toFixed(1)} % w/w, ${totals.internalVolumePercent?.toFixed(1)} % v/v internal phase.`}
        {was !== null && before ? ` Hollow: ${was.toFixed(1)} in version ${before.number}.` : ''}
      </p>
      <div className="mt-5">
        <Checks checks={checks} />
      </div>
    </div>
  )
}
