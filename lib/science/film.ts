import { assertComputable, assertPositive, ScienceError } from './guard'

/**
 * How thick the continuous phase is between drops, in nanometres, if it all lay in flat films: the interface of drops
 * of Sauter mean diameter d is 6φ/d in a volume, two drops share each film, so h = d(1 − φ)/(3φ) [handbook: geometry].
 * An average: corners between drops hold more of it, so films between faces are thinner. Drops touch, hence above the
 * closest packing.
 */
export function filmThickness({
  internalVolumePercent,
  diameterUm,
}: {
  internalVolumePercent: number
  diameterUm: number
}): { filmNm: number } {
  assertPositive('internalVolumePercent', internalVolumePercent)
  if (internalVolumePercent > 100)
    throw new ScienceError('internalVolumePercent', `must be at most 100, not ${internalVolumePercent}`)
  assertPositive('diameterUm', diameterUm)
  const share = internalVolumePercent / 100
  return assertComputable('diameterUm', { filmNm: (1000 * diameterUm * (1 - share)) / (3 * share) })
}
