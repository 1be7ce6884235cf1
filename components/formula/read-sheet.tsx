import { phasesOf } from '@/lib/formula/rules/arrange'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import type { PhaseTotal } from '@/lib/formula/rules/totals'
import type { EmulsionType, FormulaLine } from '@/lib/formula/schema'
import type { FigureFacts } from '@/lib/science/methods/method'
import { PhaseRow } from './phase-row'

type Props = {
  lines: FormulaLine[]
  phases: PhaseTotal[]
  emulsionType: EmulsionType
  factsOfPhase: (total: PhaseTotal) => FigureFacts
  foot: React.ReactNode
}

/** The lines of a locked version, or for someone who only reads. */
export function ReadSheet({ lines, phases, emulsionType, factsOfPhase, foot }: Props) {
  return (
    <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Lines of the formula">
      <table className="w-full min-w-[560px] table-fixed border-collapse text-15">
        <caption className="sr-only">Lines of the formula</caption>
        <colgroup>
          <col />
          {[132, 20, 84, 60, 66, 56, 4].map((width, index) => (
            <col key={index} style={{ width }} />
          ))}
        </colgroup>
        <thead>
          <tr className="text-13 text-soft [&_th]:px-2 [&_th]:pb-1.5 [&_th]:font-430">
            <th scope="col" className="text-left">
              INCI name
            </th>
            <th scope="col" colSpan={2} className="text-left">
              function
            </th>
            <th scope="col" className="text-right">
              % w/w
            </th>
            <th scope="col" className="text-right">
              g/mL
            </th>
            <th scope="col" className="text-right">
              per kg
            </th>
            <th scope="col" colSpan={2} className="text-right">
              phase
            </th>
          </tr>
        </thead>
        {phasesOf(lines).map((phase) => (
          <tbody key={phase}>
            <PhaseRow
              phase={phase}
              total={phases.find((one) => one.phase === phase)}
              isInternal={lines.some((line) => line.phase === phase && line.isInternal)}
              emulsionType={emulsionType}
              factsOfPhase={factsOfPhase}
            />
            {lines
              .filter((line) => line.phase === phase)
              .map((line) => (
                <tr key={line.id} data-line={line.id} className="border-b border-hair [&_td]:px-2">
                  <td className="h-9 break-words py-1 leading-tight">
                    {line.inciName.replaceAll('/', '/\u200b')}
                  </td>
                  <td colSpan={2} className="text-14 text-soft">
                    {line.function}
                  </td>
                  <td className="text-right text-16 font-650">
                    {line.isRemainder ? <span className="text-13 font-430">q.s. </span> : null}
                    {percentText(line.percentThousandths)}
                  </td>
                  <td className="text-right text-14">{line.density.toFixed(3)}</td>
                  <td className="text-right text-14">
                    {line.priceCentsPerKg === null ? '' : moneyText(line.priceCentsPerKg)}
                  </td>
                  <td colSpan={2} className="text-right text-13 text-soft">
                    {line.isInternal ? 'inside' : 'outside'}
                  </td>
                </tr>
              ))}
          </tbody>
        ))}
        {foot}
      </table>
    </div>
  )
}
