import {
  assertComputable,
  assertNumbers,
  assertPositive,
  assertNotNegative,
  assertSameLength,
  ScienceError,
} from './guard'

export type Droplets = { d10: number; d32: number; d43: number; d50v: number; span: number }

/**
 * Mean diameters of a droplet count as moment means D[p,q] (notation of ISO 9276-2), the volume median and the span
 * (d90 − d10)/d50 by volume. Quantiles are linear between the different diameters, each standing at the middle of its own
 * share of the volume; outside the first and last they are those. Micrometres.
 */
export function droplets({ diametersUm, counts }: { diametersUm: number[]; counts?: number[] }): Droplets {
  assertNumbers('diametersUm', diametersUm, 1)
  diametersUm.forEach((d, i) => assertPositive(`diametersUm[${i}]`, d))
  if (counts) {
    assertNumbers('counts', counts, 1)
    assertSameLength('diametersUm', diametersUm, 'counts', counts)
    counts.forEach((count, i) => assertNotNegative(`counts[${i}]`, count))
  }
  const countOf = new Map<number, number>()
  diametersUm.forEach((d, i) => countOf.set(d, (countOf.get(d) ?? 0) + (counts?.[i] ?? 1)))
  const classes = [...countOf]
    .map(([d, n]) => ({ d, n }))
    .filter((c) => c.n > 0)
    .sort((a, b) => a.d - b.d)
  const largest = classes[classes.length - 1]?.d
  if (largest === undefined) throw new ScienceError('counts', 'add up to no droplet at all')

  // Moments of the diameters relative to the largest, so that fourth powers neither overflow nor vanish.
  const moment = (power: number) => classes.reduce((sum, c) => sum + c.n * (c.d / largest) ** power, 0)
  const quantile = volumeQuantile(classes, largest)
  const d50v = quantile(0.5)
  return assertComputable('diametersUm', {
    d10: (largest * moment(1)) / moment(0),
    d32: (largest * moment(3)) / moment(2),
    d43: (largest * moment(4)) / moment(3),
    d50v,
    span: (quantile(0.9) - quantile(0.1)) / d50v,
  })
}

function volumeQuantile(
  classes: readonly { d: number; n: number }[],
  largest: number,
): (share: number) => number {
  let total = 0
  const middles = classes.map((c) => {
    const volume = c.n * (c.d / largest) ** 3
    total += volume
    return { d: c.d, at: total - volume / 2 }
  })
  return (share) => {
    const target = share * total
    const after = middles.findIndex((m) => m.at >= target)
    if (after === 0) return middles[0]!.d
    if (after === -1) return middles[middles.length - 1]!.d
    const low = middles[after - 1]!
    const high = middles[after]!
    return low.d + ((target - low.at) / (high.at - low.at)) * (high.d - low.d)
  }
}
