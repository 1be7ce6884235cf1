import { assertComputable, assertNotNegative, assertPositive, ScienceError } from './guard'
import { highInternalPhaseAbove } from './phase-fraction'

/** An amount by mass, in any one unit, and its density in g/mL. */
export type Portion = { mass: number; density: number }

function volumeOf(portions: readonly Portion[]): number {
  let volume = 0
  portions.forEach(({ mass, density }, i) => {
    assertNotNegative(`portions[${i}].mass`, mass)
    assertPositive(`portions[${i}].density`, density)
    volume += mass / density
  })
  return assertComputable('portions', volume)
}

/** Each portion's share of the volume in percent, volumes taken as additive as in `phaseFraction`. */
export function volumeShares(portions: readonly Portion[]): number[] {
  const volume = volumeOf(portions)
  if (volume === 0) throw new ScienceError('portions', 'add up to nothing')
  return portions.map(({ mass, density }) => (100 * mass) / density / volume)
}

export type Joining = {
  /** Fraction inside once this share of the inner phase is in. */
  fractionAt: (share: number) => number
  /** Share of the inner phase from which the drops are packed (0.74 [book]); above 1 where they never are. */
  packedShare: number
}

/** How full an emulsion gets while its inner phase goes into the outer; null where either is missing. */
export function joining(inner: readonly Portion[], outer: readonly Portion[]): Joining | null {
  const [inside, outside] = [volumeOf(inner), volumeOf(outer)]
  if (inside === 0 || outside === 0) return null
  return {
    fractionAt: (share) => (inside * share) / (inside * share + outside),
    packedShare: (highInternalPhaseAbove * outside) / ((1 - highInternalPhaseAbove) * inside),
  }
}
