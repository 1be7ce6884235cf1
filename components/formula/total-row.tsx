'use client'

import { useState } from 'react'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import { grouped, readDecimal } from '@/lib/number/rules'
import { jarCents, oilAndWater, type Amounts, type FormulaTotals } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import { FigureDetails } from '@/components/ui/figure-details'
import { costFacts, jarCostFacts, oilWaterFacts, oilWaterText, totalFacts } from './formula-facts'

type Props = {
  totals: FormulaTotals
  amounts: readonly Amounts[]
  emulsionType: EmulsionType
  beforeNumber: number | null
}

/** The sheet's last lines: the sum, what is missing to 100, oil to water, and what a kilogram and a jar cost. */
export function TotalRow({ totals, amounts, emulsionType, beforeNumber }: Props) {
  const parts = oilAndWater(emulsionType, amounts)
  const { missingThousandths: missing, costCentsPerKg: cost, linesWithoutPrice } = totals
  return (
    <tfoot>
      <tr className="border-t-2 border-ink align-top">
        <th scope="row" className="h-9 px-2 pt-1.5 text-left font-750">
          Total
        </th>
        <td colSpan={2} className="px-1.5 pt-1.5 text-right text-13 text-soft">
          {missing === 0 ? (
            beforeNumber ? (
              `hollow dot: was, in version ${beforeNumber}`
            ) : (
              ''
            )
          ) : (
            <span className={missing < 0 ? 'font-650 text-alarm' : 'font-650 text-ink'}>
              {percentText(Math.abs(missing))} % {missing > 0 ? 'missing to 100' : 'too much'}
            </span>
          )}
        </td>
        <td className="px-2 pt-1.5 text-right text-16 font-750">
          <FigureDetails
            figure={`${percentText(totals.totalThousandths)} %`}
            facts={() => totalFacts(amounts, totals)}
          >
            {percentText(totals.totalThousandths)}
          </FigureDetails>
        </td>
        <td colSpan={4} className="px-1.5 pt-1.5 font-650">
          {cost === null ? null : (
            <>
              <FigureDetails
                figure={`${moneyText(cost)} per kg`}
                facts={() => costFacts(amounts, totals, `${moneyText(cost)} per kg`)}
              />
              {linesWithoutPrice > 0 ? (
                <span className="block text-13 font-430 text-soft">
                  {linesWithoutPrice} {linesWithoutPrice === 1 ? 'line has' : 'lines have'} no price
                </span>
              ) : null}
            </>
          )}
        </td>
      </tr>
      {amounts.length ? (
        <tr className="align-top">
          <td colSpan={4} className="px-2 pt-1 text-right text-13 text-soft">
            oil to water, by mass:{' '}
            <FigureDetails
              figure={oilWaterText(parts)}
              facts={() => oilWaterFacts(parts)}
              className="text-15 text-ink"
            />
          </td>
          <td colSpan={4} className="px-1.5 pt-1">
            {cost === null ? null : <JarCost totals={totals} cost={cost} />}
          </td>
        </tr>
      ) : null}
    </tfoot>
  )
}

/** What a jar's content costs; how much goes into one is typed here, as packs differ. */
function JarCost({ totals, cost }: { totals: FormulaTotals; cost: number }) {
  const [typed, setTyped] = useState('50')
  const grams = readDecimal(typed)
  const figure = grams === null || grams <= 0 ? null : grouped(jarCents(cost, grams) / 100, 3)
  return (
    <span className="flex flex-wrap items-baseline gap-x-1 text-13 text-soft">
      a jar of
      <input
        aria-label="Grams in a jar"
        inputMode="decimal"
        autoComplete="off"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        className="h-6 w-11 rounded border border-rule bg-transparent px-1 text-right text-14 text-ink focus:bg-typed"
      />
      g:{' '}
      {figure && grams ? (
        <FigureDetails
          figure={figure}
          facts={() => jarCostFacts(totals, grams, figure)}
          className="text-15 font-650 text-ink"
        />
      ) : (
        'type its grams'
      )}
    </span>
  )
}
