import { assertFinite, assertPositive } from './guard'
import { median } from './mean'

/** Beyond its own scatter once over a reading has moved; twice over nobody puts it down to chance [practice]. */
const moved = 1
const far = 2
/** Two neighbours may agree by chance; with three one can tell the instrument from the product [practice]. */
const leastOthers = 3

export type Elsewhere = 'steady' | 'moved' | 'untold'

/**
 * Whether an instrument read to one side elsewhere as well on the day of a flag, or only where it was flagged: the
 * differences of its other readings from their own trends, each in that trend's scatter. `moved` where their median
 * and at least three of them lie beyond the scatter on one side; `untold` with fewer than three, or where one alone
 * lies far off. Explains a flag to a person; the rule that acts is `instrumentDay`.
 */
export function movedElsewhere(others: readonly { difference: number; scatter: number }[]): Elsewhere {
  const shifts = others.map(({ difference, scatter }, i) => {
    assertFinite(`others[${i}].difference`, difference)
    assertPositive(`others[${i}].scatter`, scatter)
    return difference / scatter
  })
  if (shifts.length < leastOthers) return 'untold'
  const middle = median(shifts)
  const sameSide = shifts.filter((shift) => Math.sign(shift) === Math.sign(middle) && Math.abs(shift) > moved)
  if (Math.abs(middle) > moved && sameSide.length >= leastOthers) return 'moved'
  return shifts.some((shift) => Math.abs(shift) > far) ? 'untold' : 'steady'
}
