'use client'

import { FigureDetails } from '@/components/ui/figure-details'
import { dropCount, type Drops } from '@/lib/batch/rules/droplets'
import { grouped } from '@/lib/number/rules'
import { dropletsMethod } from '@/lib/science/methods/emulsion'
import { exactly, factsOf } from '@/lib/science/methods/method'

/** What a count of drops comes to, each figure with how it was come by. */
export function DropsFigures({ drops }: { drops: Drops }) {
  const { d10, d43, d50v, span, diametersUm, counts } = drops
  const count = dropCount(drops)
  const facts = (name: string, value: number, unit: string, lines: number[]) =>
    factsOf(dropletsMethod, {
      ...{ name, result: exactly(value, unit), lines },
      values: { diametersUm: `${diametersUm.length} sizes`, counts: count },
      input: { diametersUm, counts },
    })
  const figure = (name: string, value: number, unit: string, lines: number[]) => (
    <FigureDetails
      figure={`${value.toFixed(2)}${unit ? ` ${unit}` : ''}`}
      facts={() => facts(name, value, unit, lines)}
    />
  )
  const um = 'micrometres'
  return (
    <span className="block text-15">
      of {grouped(count, 0)} {count === 1 ? 'drop' : 'drops'}: mean D[1,0]{' '}
      {figure('D[1,0], by number', d10, um, [0])}, D[4,3] {figure('D[4,3], by volume', d43, um, [0])}, d50 by
      volume {figure('Volume median', d50v, um, [1])}, span {figure('Span', span, '', [1])}
    </span>
  )
}

export function sauterFacts(drops: Drops) {
  const { diametersUm, counts, d32 } = drops
  return factsOf(dropletsMethod, {
    ...{ name: 'D[3,2], by surface', result: exactly(d32, 'micrometres'), lines: [0] },
    values: { diametersUm: `${diametersUm.length} sizes`, counts: dropCount(drops) },
    input: { diametersUm, counts },
  })
}
