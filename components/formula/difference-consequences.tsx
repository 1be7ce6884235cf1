'use client'

import { FigureDetails } from '@/components/ui/figure-details'
import type { DifferencePage } from '@/lib/formula/queries/get-difference'
import { moneyText, percentText } from '@/lib/formula/rules/numbers'
import { grouped } from '@/lib/number/rules'
import { targetPhText } from '@/lib/formula/rules/target-ph'
import type { FigureFacts } from '@/lib/science/methods/method'
import { costFacts, insideFacts, oilWaterFacts, oilWaterText, totalFacts } from './formula-facts'

type Side = { lines: DifferencePage['from']['lines']; own: DifferencePage['difference']['from'] }
type Row = {
  name: string
  text: (side: Side) => string
  /** Null for what is typed, not computed. */
  facts: ((side: Side) => FigureFacts) | null
  /** The second less the first, with its sign; empty where one is not there. */
  moved: (from: Side['own'], to: Side['own']) => string
}

const signed = (value: number, text: (size: number) => string) =>
  value === 0 ? 'same' : `${value > 0 ? '+' : '\u2212'}${text(Math.abs(value))}`
const between = (a: number | null, b: number | null, text: (size: number) => string) =>
  a === null || b === null ? '' : signed(b - a, text)
const tenths = (size: number) => (size < 0.05 ? 'under 0.1' : size.toFixed(1))

const rows: Row[] = [
  {
    name: 'total, %',
    text: ({ own }) => percentText(own.totalThousandths),
    facts: ({ lines, own }) => totalFacts(lines, own),
    moved: (a, b) => between(a.totalThousandths, b.totalThousandths, percentText),
  },
  {
    name: 'inside, % by volume',
    text: ({ own }) => own.internalVolumePercent?.toFixed(1) ?? '',
    facts: ({ lines, own }) => insideFacts(lines, own, 'volume'),
    moved: (a, b) => between(a.internalVolumePercent, b.internalVolumePercent, tenths),
  },
  {
    name: 'inside, % by mass',
    text: ({ own }) => own.internalMassPercent?.toFixed(1) ?? '',
    facts: ({ lines, own }) => insideFacts(lines, own, 'mass'),
    moved: (a, b) => between(a.internalMassPercent, b.internalMassPercent, tenths),
  },
  {
    name: 'oil to water, % w/w',
    text: ({ own }) => oilWaterText(own),
    facts: ({ own }) => oilWaterFacts(own),
    moved: (a, b) => between(a.oilThousandths, b.oilThousandths, (size) => `${percentText(size)} oil`),
  },
  {
    name: 'cost per kg',
    text: ({ own }) => (own.costCentsPerKg === null ? '' : moneyText(own.costCentsPerKg)),
    facts: ({ lines, own }) => costFacts(lines, own, `${moneyText(own.costCentsPerKg ?? 0)} per kg`),
    moved: (a, b) => between(a.costCentsPerKg, b.costCentsPerKg, (size) => grouped(size / 100, 2)),
  },
  {
    name: 'target pH',
    text: ({ own }) => targetPhText(own.targetPh),
    facts: null,
    moved: (a, b) => (targetPhText(a.targetPh) === targetPhText(b.targetPh) ? 'same' : 'another'),
  },
]

function Figure({ row, side }: { row: Row; side: Side }) {
  const { facts } = row
  return facts ? <FigureDetails figure={row.text(side)} facts={() => facts(side)} /> : row.text(side)
}

/** What the changes come to: each figure of both, and by how much it moved. */
export function Consequences({ page, names }: { page: DifferencePage; names: [string, string] }) {
  const { difference } = page
  const sides: [Side, Side] = [
    { lines: page.from.lines, own: difference.from },
    { lines: page.to.lines, own: difference.to },
  ]
  return (
    <table className="w-full border-collapse text-15">
      <caption className="sr-only">What follows from the difference</caption>
      <thead>
        <tr className="text-13 text-soft [&_th]:pb-1 [&_th]:font-430">
          <td />
          <th scope="col" className="pr-3 text-right">
            {names[0]}
          </th>
          <th scope="col" className="pr-3 text-right">
            {names[1]}
          </th>
          <th scope="col" className="text-right">
            difference
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.name} className="border-b border-hair">
            <th scope="row" className="h-9 py-1 pr-3 text-left font-430">
              {row.name}
            </th>
            {sides.map((side, index) => (
              <td
                key={index}
                className={`pr-3 text-right whitespace-nowrap ${index ? 'font-700' : 'text-soft'}`}
              >
                {row.text(side) ? (
                  <Figure row={row} side={side} />
                ) : (
                  <span className="text-13 font-430 text-soft">not known</span>
                )}
              </td>
            ))}
            <td className="text-right whitespace-nowrap">{row.moved(difference.from, difference.to)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
