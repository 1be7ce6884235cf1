import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import type { Amounts, FormulaTotals } from '@/lib/formula/rules/totals'
import { FigureDetails } from '@/components/ui/figure-details'
import { costFacts, totalFacts } from './formula-facts'

type Props = { totals: FormulaTotals; amounts: readonly Amounts[]; beforeNumber: number | null }

/** The sheet's last line: the sum, what is missing to 100, and what a kilogram costs. */
export function TotalRow({ totals, amounts, beforeNumber }: Props) {
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
    </tfoot>
  )
}
