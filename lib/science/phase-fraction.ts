import { assertComputable, assertFinite, assertNotNegative, assertPositive, ScienceError } from './guard'
import { asDecimal, exceeds } from './rounding'

export type PhaseLine = {
  /** % w/w. */
  percent: number
  /** g/mL. */
  density: number
  /** In the internal (dispersed) phase. */
  internal: boolean
}

export type PhaseFraction = {
  totalPercent: number
  internalMassPercent: number
  internalVolumePercent: number
  highInternalPhase: boolean
}

/** Closest packing of equal spheres, π/√18; 0.74 is the customary threshold of a high internal phase [book]. */
export const closestPacking = Math.PI / Math.sqrt(18)
export const highInternalPhaseAbove = 0.74

/**
 * Internal phase by volume: φ = Σ(wᵢ/ρᵢ over internal lines) / Σ(wᵢ/ρᵢ), volumes taken as additive.
 * Droplets of mixed sizes can stay spherical above the closest packing of equal ones.
 * Percentages add up as decimals, so that 100.00 is 100 exactly.
 */
export function phaseFraction({ lines }: { lines: readonly PhaseLine[] }): PhaseFraction {
  if (lines.length === 0) throw new ScienceError('lines', 'needs at least one line')
  let volume = 0
  let internalVolume = 0
  lines.forEach((line, i) => {
    assertFinite(`lines[${i}].percent`, line.percent)
    assertNotNegative(`lines[${i}].percent`, line.percent)
    assertPositive(`lines[${i}].density`, line.density)
    volume += line.percent / line.density
    if (line.internal) internalVolume += line.percent / line.density
  })
  const totalPercent = sumPercent(lines)
  if (totalPercent === 0 || volume === 0) throw new ScienceError('lines', 'add up to 0 %')
  const internalMass = sumPercent(lines.filter((line) => line.internal))
  const share = Math.min(1, internalVolume / volume)
  return assertComputable('lines', {
    totalPercent,
    internalMassPercent: (100 * internalMass) / totalPercent,
    internalVolumePercent: 100 * share,
    highInternalPhase: exceeds(share, highInternalPhaseAbove),
  })
}

function sumPercent(lines: readonly PhaseLine[]): number {
  let sum = 0
  let lost = 0
  for (const { percent } of lines) {
    // Neumaier's sum keeps what an addition rounds away, and the decimal that was meant is then near enough to find.
    const next = sum + percent
    lost += sum >= percent ? sum - next + percent : percent - next + sum
    sum = next
  }
  return asDecimal(sum + lost)
}
