'use client'

import { FigureDetails } from '@/components/ui/figure-details'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import { memberLines } from '@/lib/formula/rules/variants'
import { Cell } from './cell'
import { costFacts, insideFacts } from './formula-facts'
import { walkSheet } from './sheet-keys'
import type { FamilyPlan, PlannedMember, TypedFamily } from './variant-plan'
import type { FamilyBase } from './variants-form'

type Props = {
  plan: FamilyPlan
  base: FamilyBase
  typed: TypedFamily
  onSet: (change: Partial<TypedFamily>) => void
}

/** The family before it is made: a line each, codes and names to type over, Enter and arrows walk it. */
export function VariantRows({ plan, base, typed, onSet }: Props) {
  const remainder = base.lines.find((line) => line.isRemainder)
  return (
    <div className="relative overflow-x-auto" tabIndex={0} role="region" aria-label="The family to be made">
      <table
        className="w-full min-w-[720px] border-collapse text-15"
        onKeyDown={(event) => void walkSheet(event)}
      >
        <caption className="sr-only">The family to be made</caption>
        <thead>
          <tr className="border-b-[1.75px] border-ink text-13 text-soft [&_th]:px-1.5 [&_th]:pb-1.5 [&_th]:font-430">
            <th scope="col" className="w-[120px] text-left">
              code
            </th>
            <th scope="col" className="text-left">
              name
            </th>
            {plan.names.map((name) => (
              <th key={name} scope="col" className="text-right">
                {name}, %
              </th>
            ))}
            <th scope="col" className="text-right">
              {remainder?.inciName} q.s., %
            </th>
            <th scope="col" className="text-right">
              inside, % v/v
            </th>
            <th scope="col" className="text-right">
              per kg
            </th>
          </tr>
        </thead>
        <tbody>
          {plan.members.map((member) => (
            <Row
              key={member.key}
              member={member}
              lines={memberLines(
                base.lines,
                new Map(plan.lineIds.map((id, at) => [id, member.shares[at] ?? 0])),
              )}
              onCode={(code) => onSet({ codes: { ...typed.codes, [member.key]: code } })}
              onName={(name) => onSet({ names: { ...typed.names, [member.key]: name } })}
            />
          ))}
        </tbody>
      </table>
    </div>
  )
}

type RowProps = {
  member: PlannedMember
  lines: FamilyBase['lines']
  onCode: (code: string) => void
  onName: (name: string) => void
}

function Row({ member, lines, onCode, onName }: RowProps) {
  const { code, name, shares, remainder, totals, error } = member
  const row = member.key.replace(' ', '-')
  return (
    <tr className="border-b border-hair align-top focus-within:bg-paper [&_td]:py-0.5">
      <td>
        <Cell
          id={`${row}-code`}
          data-row={row}
          data-col="code"
          label={`Code of ${name}`}
          value={code}
          error={error}
          onText={onCode}
          className="font-mono font-650"
        />
      </td>
      <td>
        <Cell
          id={`${row}-name`}
          data-row={row}
          data-col="name"
          label={`Name of ${code}`}
          value={name}
          onText={onName}
        />
      </td>
      {shares.map((share, index) => (
        <td key={index} className="px-1.5 text-right leading-[31px] font-650">
          {percentText(share)}
        </td>
      ))}
      <td className={`px-1.5 text-right leading-[31px] ${remainder < 0 ? 'font-650 text-alarm' : ''}`}>
        {remainder < 0 ? '\u2212' : ''}
        {percentText(Math.abs(remainder))}
      </td>
      <td className="px-1.5 text-right leading-[31px]">
        {totals.internalVolumePercent === null ? (
          ''
        ) : (
          <FigureDetails
            figure={totals.internalVolumePercent.toFixed(1)}
            facts={() => insideFacts(lines, totals, 'volume')}
          />
        )}
      </td>
      <td className="px-1.5 text-right leading-[31px]">
        {totals.costCentsPerKg === null ? (
          ''
        ) : (
          <FigureDetails
            figure={moneyText(totals.costCentsPerKg)}
            facts={() => costFacts(lines, totals, `${moneyText(totals.costCentsPerKg ?? 0)} per kg`)}
          />
        )}
      </td>
    </tr>
  )
}
