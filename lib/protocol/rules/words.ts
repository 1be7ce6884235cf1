import { dropletMeasures, type PlannedAttribute, type PlannedCycle } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { Band } from '@/lib/science/series'
import { shownValue } from '@/lib/study/rules/words'

type Named = Pick<PlannedAttribute, 'attribute' | 'own'>

/** How far an attribute may move, as one says it. */
export function toleranceText(planned: Pick<PlannedAttribute, 'attribute' | 'own' | 'tolerance'>): string {
  const { tolerance } = planned
  const { unit } = attributeOf(planned.attribute, planned)
  if (tolerance.kind === 'range') return limitsText(planned, tolerance.lower, tolerance.upper)
  const what =
    tolerance.kind === 'percent' ? ' % of the initial' : `${unit ? ` ${unit}` : ''} from the initial`
  const { below, above } = tolerance
  if (below === above) return `within ${below}${what}`
  return [below === undefined ? '' : `${below} below`, above === undefined ? '' : `${above} above`]
    .filter(Boolean)
    .join(', ')
    .concat(what)
}

/** A band with its unit: what the tolerance comes to on one initial. */
export function bandText(planned: Named, { lower, upper }: Band): string {
  return limitsText(planned, lower ?? undefined, upper ?? undefined)
}

function limitsText(planned: Named, lower?: number, upper?: number): string {
  const attribute = attributeOf(planned.attribute, planned)
  const { unit, words } = attribute
  const shown = (value: number) => shownValue(attribute, value)
  const end = unit && !words ? ` ${unit}` : ''
  if (lower === undefined) return `at most ${shown(upper!)}${end}`
  if (upper === undefined) return `at least ${shown(lower)}${end}`
  return `${shown(lower)} to ${shown(upper)}${end}`
}

export const dropletMeasureWords: Record<(typeof dropletMeasures)[number], string> = {
  d50v: 'Median by volume',
  d32: 'Mean by surface, D[3,2]',
  d43: 'Mean by volume, D[4,3]',
  d10: 'Mean by number, D[1,0]',
}

export function cycleText({ coldC, coldHours, warmC, warmHours, isFrozenThrough }: PlannedCycle): string {
  const celsius = (value: number) => `${String(value).replace('-', '−')} °C`
  return `${coldHours} h at ${celsius(coldC)}, ${isFrozenThrough ? 'frozen through' : 'not frozen through'}, then ${warmHours} h at ${celsius(warmC)}`
}
