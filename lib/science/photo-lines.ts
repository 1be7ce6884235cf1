import { assertNotNegative, ScienceError } from './guard'
import { separation, type Separation } from './separation'

/** Rows of a photo, counted from its top, at which a straight-walled jar's fill and layers begin and end. */
export type PhotoLines = { fillTop: number; topEdge: number; bottomEdge: number; base: number }

/**
 * Separation from four lines on a photo: the heights between them as percent of the height from base to fill top. In a jar of
 * straight walls seen from the side these are shares of its volume; a lean of the jar cancels, because all heights
 * lean alike. No layer: its two lines are the same row. Throws where the lines are out of order.
 */
export function separationOfLines({ fillTop, topEdge, bottomEdge, base }: PhotoLines): Separation {
  assertNotNegative('fillTop', fillTop)
  if (!(fillTop < base)) throw new ScienceError('base', 'does not lie below fillTop')
  if (!(fillTop <= topEdge && topEdge <= bottomEdge && bottomEdge <= base))
    throw new ScienceError(
      'topEdge',
      'and bottomEdge do not lie between fillTop and base, one above the other',
    )
  return separation({ totalMm: base - fillTop, topMm: topEdge - fillTop, bottomMm: base - bottomEdge })
}
