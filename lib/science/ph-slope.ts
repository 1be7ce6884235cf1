import { assertComputable, assertFinite, ScienceError } from './guard'
import { kelvin } from './kelvin'
import { gasConstant } from './mean-kinetic-temperature'
import { centredSums } from './regression'
import { apartFrom, isAbove } from './rounding'

/** C/mol, CODATA 2018. */
const faraday = 96485.33212
/** Efficiency outside these % of the theoretical slope is a doubt [practice; USP <791> allows 90 to 105]. */
export const phEfficiencyRange = { low: 95, high: 105 } as const

export type PhSlopeInput = { points: { bufferPh: number; mV: number }[]; temperatureC: number }
export type PhSlope = {
  /** Negative for a healthy electrode. */
  slopeMvPerPh: number
  /** Potential at pH 7. */
  offsetMv: number
  efficiencyPercent: number
  doubt: string | null
}

/** ln(10)·R·T/F in mV per pH: 59.16 at 25 °C. */
export function theoreticalSlope(temperatureC: number): number {
  return (1000 * Math.LN10 * gasConstant * kelvin('temperatureC', temperatureC)) / faraday
}

/** Slope and offset of a pH meter from a two- or three-point (or longer) least-squares line of mV on buffer pH. */
export function phSlope({ points, temperatureC }: PhSlopeInput): PhSlope {
  const theoretical = theoreticalSlope(temperatureC)
  if (points.length < 2) throw new ScienceError('points', `needs at least 2 points, has ${points.length}`)
  points.forEach((point, i) => {
    assertFinite(`points[${i}].bufferPh`, point.bufferPh)
    assertFinite(`points[${i}].mV`, point.mV)
  })
  const sums = centredSums(
    points.map((point) => point.bufferPh),
    points.map((point) => point.mV),
  )
  if (sums.xx === 0) throw new ScienceError('points', 'have no spread: all buffers are equal')
  const slopeMvPerPh = sums.xy / sums.xx
  const efficiencyPercent = (-100 * slopeMvPerPh) / theoretical
  return assertComputable('points', {
    slopeMvPerPh,
    offsetMv: sums.meanY + slopeMvPerPh * (7 - sums.meanX),
    efficiencyPercent,
    doubt: efficiencyDoubt(efficiencyPercent),
  })
}

function efficiencyDoubt(percent: number): string | null {
  const isUnder = isAbove(phEfficiencyRange.low, percent)
  if (!isUnder && !isAbove(percent, phEfficiencyRange.high)) return null
  if (percent <= 0) return 'The slope has the wrong sign: check which buffer stood in which beaker'
  const limit = isUnder ? phEfficiencyRange.low : phEfficiencyRange.high
  return `The slope is ${apartFrom(limit, percent)} % of the theoretical one, ${isUnder ? 'under' : 'over'} ${limit} %`
}
