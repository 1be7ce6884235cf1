import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import type { FormulaTotals } from '@/lib/formula/rules/totals'

/** The sheet's last line: the sum, what is missing to 100, and what a kilogram costs. */
export function TotalRow({ totals, beforeNumber }: { totals: FormulaTotals; beforeNumber: number | null }) {
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
        <td className="px-2 pt-1.5 text-right text-16 font-750">{percentText(totals.totalThousandths)}</td>
        <td colSpan={4} className="px-1.5 pt-1.5 font-650">
          {cost === null ? null : (
            <>
              {moneyText(cost)} per kg
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
