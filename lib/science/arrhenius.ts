import { tTwoTails } from './distributions'
import { assertComputable, assertNumbers, assertPositive, assertSameLength, ScienceError } from './guard'
import { leastSquares } from './least-squares'
import { kelvin } from './kelvin'
import { gasConstant } from './mean-kinetic-temperature'
import { fitLine, predictLine } from './regression'

export type ArrheniusInput = { temperaturesC: number[]; rates: number[]; predictC?: number[] }

export type Arrhenius = {
  eaKJ: number
  lnA: number
  eaSe: number
  r2: number | null
  predictions: { temperatureC: number; rate: number; low: number; high: number }[]
  /** A curved plot means a mechanism that changes with temperature. `p` is null where it was not tested. */
  curvature: { p: number | null; doubt: string | null }
}

/**
 * Arrhenius: unweighted least squares of ln k on 1/T over at least three different temperatures; predictions with
 * the 95 % two-sided limits of the mean. Curvature is tested (quadratic term, t test at 0.05) from four temperatures.
 */
export function arrhenius({ temperaturesC, rates, predictC = [] }: ArrheniusInput): Arrhenius {
  assertNumbers('temperaturesC', temperaturesC, 3)
  assertNumbers('rates', rates, 3)
  assertSameLength('temperaturesC', temperaturesC, 'rates', rates)
  rates.forEach((rate, i) => assertPositive(`rates[${i}]`, rate))
  const inverse = temperaturesC.map((t, i) => 1 / kelvin(`temperaturesC[${i}]`, t))
  if (new Set(temperaturesC).size < 3)
    throw new ScienceError('temperaturesC', 'needs at least 3 different temperatures')
  if (new Set(inverse).size < 3)
    throw new ScienceError('temperaturesC', 'lie too close together to tell apart in 1/T')
  const logs = rates.map(Math.log)

  const fit = fitLine(inverse, logs)
  const predictions = predictC.map((t, i) => {
    const { mean, meanLow, meanHigh } = predictLine(fit, 1 / kelvin(`predictC[${i}]`, t))
    return { temperatureC: t, rate: Math.exp(mean), low: Math.exp(meanLow), high: Math.exp(meanHigh) }
  })
  return assertComputable('temperaturesC', {
    eaKJ: (-fit.slope * gasConstant) / 1000,
    lnA: fit.intercept,
    eaSe: (fit.slopeSe * gasConstant) / 1000,
    r2: fit.r2,
    predictions,
    curvature: curvatureOf(inverse, logs),
  })
}

function curvatureOf(inverse: readonly number[], logs: readonly number[]): Arrhenius['curvature'] {
  if (new Set(inverse).size < 4) return { p: null, doubt: 'curvature not tested: it takes four temperatures' }
  const low = inverse.reduce((least, x) => Math.min(least, x))
  const range = inverse.reduce((most, x) => Math.max(most, x)) - low
  const design = inverse.map((x) => [1, (2 * (x - low)) / range - 1, ((2 * (x - low)) / range - 1) ** 2])
  const { coefficients, standardErrors, df } = leastSquares(design, logs)
  if (!(standardErrors[2]! > 0)) return { p: null, doubt: null }
  const p = tTwoTails(coefficients[2]! / standardErrors[2]!, df)
  return { p, doubt: p < 0.05 ? 'the plot is curved: the mechanism may change with temperature' : null }
}
