import type { PlannedAttribute, PlannedCycle } from '@/lib/protocol/schema'
import { attributeOf } from '@/lib/reading/schema/attributes'
import type { Band } from '@/lib/science/series'
import { shownValue } from '@/lib/study/rules/words'

/** How far an attribute may move, as one says it. */
export function toleranceText({
  attribute,
  tolerance,
}: Pick<PlannedAttribute, 'attribute' | 'tolerance'>): string {
  const { unit } = attributeOf(attribute)
  if (tolerance.kind === 'range') return limitsText(attribute, tolerance.lower, tolerance.upper)
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
export function bandText(attribute: PlannedAttribute['attribute'], { lower, upper }: Band): string {
  return limitsText(attribute, lower ?? undefined, upper ?? undefined)
}

function limitsText(attribute: PlannedAttribute['attribute'], lower?: number, upper?: number): string {
  const { unit, words } = attributeOf(attribute)
  const shown = (value: number) => shownValue(attribute, value)
  const end = unit && !words ? ` ${unit}` : ''
  if (lower === undefined) return `at most ${shown(upper!)}${end}`
  if (upper === undefined) return `at least ${shown(lower)}${end}`
  return `${shown(lower)} to ${shown(upper)}${end}`
}

export function cycleText({ coldC, coldHours, warmC, warmHours, isFrozenThrough }: PlannedCycle): string {
  const celsius = (value: number) => `${String(value).replace('-', '−')} °C`
  return `${coldHours} h at ${celsius(coldC)}, ${isFrozenThrough ? 'frozen through' : 'not frozen through'}, then ${warmHours} h at ${celsius(warmC)}`
}
