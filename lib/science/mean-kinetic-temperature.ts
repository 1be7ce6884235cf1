import { assertComputable, assertNumbers, assertPositive, assertSameLength, ScienceError } from './guard'
import { kelvin, zeroCelsius } from './kelvin'

/** J/(mol·K), CODATA 2018. */
export const gasConstant = 8.314462618
/** kJ/mol, the customary activation enthalpy: USP <1160>, Haynes 1971 [std]. */
export const defaultDeltaHkJ = 83.144

export type MeanKineticTemperature = { mktC: number; meanC: number; minC: number; maxC: number }

/**
 * Mean kinetic temperature: the constant temperature with the same mean Arrhenius rate as the record.
 * T_K = (ΔH/R) / −ln(Σ hᵢ e^(−ΔH/(R·Tᵢ)) / Σ hᵢ), USP <1160>. Times of different length weigh by `hoursEach`, and
 * the mean is weighted likewise. Written relative to the warmest reading, so that no exponential underflows.
 */
export function meanKineticTemperature(
  temperaturesC: readonly number[],
  hoursEach?: readonly number[],
  deltaHkJ = defaultDeltaHkJ,
): MeanKineticTemperature {
  assertNumbers('temperaturesC', temperaturesC, 1)
  assertPositive('deltaHkJ', deltaHkJ)
  const kelvins = temperaturesC.map((t, i) => kelvin(`temperaturesC[${i}]`, t))
  const hours = hoursEach ?? temperaturesC.map(() => 1)
  if (hoursEach) {
    assertNumbers('hoursEach', hoursEach, 1)
    assertSameLength('temperaturesC', temperaturesC, 'hoursEach', hoursEach)
    hoursEach.forEach((h, i) => {
      if (h < 0) throw new ScienceError(`hoursEach[${i}]`, `must not be negative, but is ${h}`)
    })
  }
  let total = 0
  for (const h of hours) total += h
  if (!(total > 0)) throw new ScienceError('hoursEach', 'add up to no time at all')

  const weighed = temperaturesC.filter((_, i) => hours[i]! > 0)
  let minC = Infinity
  let maxC = -Infinity
  for (const t of weighed) {
    minC = Math.min(minC, t)
    maxC = Math.max(maxC, t)
  }
  const scale = (deltaHkJ * 1000) / gasConstant
  const warmest = maxC + zeroCelsius
  let rate = 0
  let meanAboveMin = 0
  temperaturesC.forEach((t, i) => {
    const share = hours[i]! / total
    if (share === 0) return
    rate += share * Math.expm1(scale * (1 / warmest - 1 / kelvins[i]!))
    meanAboveMin += share * (t - minC)
  })
  const steady = 1 / (1 / warmest - Math.log1p(Math.max(-1, rate)) / scale)
  const meanC = Math.min(maxC, minC + meanAboveMin)
  // Where the rate bends upwards over the whole record the result is never below the mean, whatever rounding says.
  const least = scale > 2 * warmest ? meanC : minC
  return assertComputable('temperaturesC', {
    mktC: Math.min(maxC, Math.max(least, steady - zeroCelsius)),
    meanC,
    minC,
    maxC,
  })
}
