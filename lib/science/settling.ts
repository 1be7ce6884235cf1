import { assertComputable, assertFinite, assertPositive } from './guard'

export type SettlingInput = {
  diameterUm: number
  /** Continuous minus dispersed, kg/m³: positive rises. */
  densityDifference: number
  viscosityMPas: number
  g?: number
}

const standardGravity = 9.80665
const secondsPerDay = 86400

/**
 * Stokes velocity of a single drop, v = g·d²·Δρ/(18·η), in mm per day. Dilute limit only: in a packed emulsion the
 * drops hold each other and this does not apply.
 */
export function settling(input: SettlingInput): { velocityMmPerDay: number } {
  const { diameterUm, densityDifference, viscosityMPas, g = standardGravity } = input
  assertPositive('diameterUm', diameterUm)
  assertFinite('densityDifference', densityDifference)
  assertPositive('viscosityMPas', viscosityMPas)
  assertPositive('g', g)
  const metres = diameterUm * 1e-6
  const perSecond = (g * metres * metres * densityDifference) / (18 * viscosityMPas * 1e-3)
  return assertComputable('diameterUm', { velocityMmPerDay: perSecond * 1000 * secondsPerDay })
}
