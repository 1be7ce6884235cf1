import { assertComputable, assertNotNegative, assertPositive, ScienceError } from './guard'

export type Titrated = {
  /** % w/w. */
  percent: number
  /** mg KOH per g: acid value of an acid, what a neutraliser gives. */
  value: number
}

/**
 * How much of the acid its neutraliser takes up, in percent: Σ(wᵢ·base valueᵢ) / Σ(wᵢ·acid valueᵢ) over the lines.
 * Both values are in mg KOH per g, so that they cancel [standard definition of acid value, ISO 660].
 */
export function neutralisedPercent({
  acids,
  bases,
}: {
  acids: readonly Titrated[]
  bases: readonly Titrated[]
}): number {
  if (acids.length === 0) throw new ScienceError('acids', 'needs at least one')
  const acid = equivalents('acids', acids)
  assertPositive('acids', acid)
  return assertComputable('acids', (100 * equivalents('bases', bases)) / acid)
}

function equivalents(name: string, lines: readonly Titrated[]): number {
  return lines.reduce((sum, { percent, value }, i) => {
    assertNotNegative(`${name}[${i}].percent`, percent)
    assertNotNegative(`${name}[${i}].value`, value)
    return sum + percent * value
  }, 0)
}
