import { assertComputable, assertNotNegative, assertPositive, ScienceError } from './guard'

export type LayerHeights = { totalMm: number; topMm: number; bottomMm: number }

export type Separation = {
  /** Free oil on top, % of fill height. */
  topPercent: number
  /** Water or serum below, % of fill height. */
  bottomPercent: number
  percent: number
}

/**
 * Separation as percent of fill height: free oil on top plus water or serum below. A cream layer does not count.
 * Heights in mm (or any one unit).
 */
export function separation({ totalMm, topMm, bottomMm }: LayerHeights): Separation {
  assertPositive('totalMm', totalMm)
  assertNotNegative('topMm', topMm)
  assertNotNegative('bottomMm', bottomMm)
  if (topMm > totalMm) throw new ScienceError('topMm', `is higher than the fill of ${totalMm}`)
  if (bottomMm > totalMm) throw new ScienceError('bottomMm', `is higher than the fill of ${totalMm}`)
  // Layers typed to a tenth may pass the fill by rounding alone: 0.1 + 0.2 against 0.3.
  if (topMm + bottomMm > totalMm * (1 + 1e-12)) {
    throw new ScienceError('bottomMm', `and topMm together are higher than the fill of ${totalMm}`)
  }
  return assertComputable('totalMm', {
    topPercent: (100 * topMm) / totalMm,
    bottomPercent: (100 * bottomMm) / totalMm,
    percent: Math.min(100, (100 * (topMm + bottomMm)) / totalMm),
  })
}

/** What a ruler tells, a millimetre where nothing else is said, in percent of fill height [practice]. */
export function rulerPercent(totalMm: number, rulerMm = 1): number {
  assertPositive('totalMm', totalMm)
  assertPositive('rulerMm', rulerMm)
  return assertComputable('totalMm', (100 * rulerMm) / totalMm)
}

/** Percent of fill height under which separation is not told apart from none: 1 %, or what the ruler tells [practice]. */
export function separationDetectionLimit(totalMm: number, rulerMm = 1): number {
  return Math.min(100, Math.max(1, rulerPercent(totalMm, rulerMm)))
}
