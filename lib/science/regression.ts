import { tQuantile, tTwoTails } from './distributions'
import { assertComputable, assertFinite, assertNumbers, assertSameLength, ScienceError } from './guard'
import { mean } from './mean'

/** An ordinary least-squares line with everything that later questions to it need. */
export type LineFit = {
  n: number
  slope: number
  intercept: number
  slopeSe: number
  interceptSe: number
  residualSd: number
  /** null where y is constant. */
  r2: number | null
  df: number
  /** Two-sided; null without residual variation. */
  slopeP: number | null
  meanX: number
  meanY: number
  sumSquaresX: number
  residualSumSquares: number
}

export type Prediction = {
  x: number
  mean: number
  meanLow: number
  meanHigh: number
  newLow: number
  newHigh: number
}

export type RegressionInput = { x: number[]; y: number[]; confidence?: number; at?: number[] }

export type Regression = Pick<
  LineFit,
  'n' | 'slope' | 'intercept' | 'slopeSe' | 'interceptSe' | 'residualSd' | 'r2' | 'df' | 'slopeP'
> & { predictions: Prediction[] }

/** The line of y on x and its predictions at `at`, with two-sided limits at `confidence` (0.95). */
export function regression({ x, y, confidence = 0.95, at = [] }: RegressionInput): Regression {
  assertConfidence(confidence)
  at.forEach((value, i) => assertFinite(`at[${i}]`, value))
  const fit = fitLine(x, y)
  const { n, slope, intercept, slopeSe, interceptSe, residualSd, r2, df, slopeP } = fit
  const predictions = at.map((value) => predictLine(fit, value, confidence))
  return { n, slope, intercept, slopeSe, interceptSe, residualSd, r2, df, slopeP, predictions }
}

export function assertConfidence(confidence: number): void {
  assertFinite('confidence', confidence)
  if (confidence <= 0 || confidence >= 1) {
    throw new ScienceError('confidence', `must lie between 0 and 1, not ${confidence}`)
  }
}

/**
 * Ordinary least squares of y on x, centred before squaring (checked against NIST StRD Norris).
 * Needs three points and two different x; throws ScienceError naming `x` or `y`.
 */
export function fitLine(x: readonly number[], y: readonly number[]): LineFit {
  assertNumbers('x', x, 3)
  assertNumbers('y', y, 3)
  assertSameLength('x', x, 'y', y)
  const n = x.length
  const sums = centredSums(x, y)
  if (sums.xx === 0) throw new ScienceError('x', 'has no spread: all values are equal')

  const slope = sums.xy / sums.xx
  const intercept = sums.meanY - slope * sums.meanX
  const residualSumSquares = residualSquares(x, y, sums.meanX, sums.meanY, slope)
  const df = n - 2
  const residualSd = Math.sqrt(residualSumSquares / df)
  const slopeSe = residualSd / Math.sqrt(sums.xx)
  const fit: LineFit = {
    n,
    slope,
    intercept,
    slopeSe,
    interceptSe: residualSd * Math.sqrt(1 / n + sums.meanX ** 2 / sums.xx),
    residualSd,
    r2: sums.yy === 0 ? null : Math.max(0, 1 - residualSumSquares / sums.yy),
    df,
    slopeP: slopeSe === 0 ? null : tTwoTails(slope / slopeSe, df),
    meanX: sums.meanX,
    meanY: sums.meanY,
    sumSquaresX: sums.xx,
    residualSumSquares,
  }
  return assertComputable('x', fit)
}

/** The line's mean and a new observation at x, with two-sided limits at `confidence`. */
export function predictLine(fit: LineFit, x: number, confidence = 0.95): Prediction {
  const t = tQuantile(1 - (1 - confidence) / 2, fit.df)
  const centre = fit.meanY + fit.slope * (x - fit.meanX)
  const leverage = 1 / fit.n + (x - fit.meanX) ** 2 / fit.sumSquaresX
  const ofMean = t * fit.residualSd * Math.sqrt(leverage)
  const ofNew = t * fit.residualSd * Math.sqrt(1 + leverage)
  return assertComputable('at', {
    x,
    mean: centre,
    meanLow: centre - ofMean,
    meanHigh: centre + ofMean,
    newLow: centre - ofNew,
    newHigh: centre + ofNew,
  })
}

export type CentredSums = { meanX: number; meanY: number; xx: number; xy: number; yy: number }

/** Sums of squares and products about the means. */
export function centredSums(x: readonly number[], y: readonly number[]): CentredSums {
  const meanX = mean(x)
  const meanY = mean(y)
  let xx = 0
  let xy = 0
  let yy = 0
  for (let i = 0; i < x.length; i++) {
    const dx = x[i]! - meanX
    const dy = y[i]! - meanY
    xx += dx * dx
    xy += dx * dy
    yy += dy * dy
  }
  return { meanX, meanY, xx, xy, yy }
}

/**
 * Sum of squared residuals about a line through (meanX, meanY). What is no more than rounding of y itself is 0, so
 * that points lying exactly on a line have no residual variation instead of a meaningless one.
 */
export function residualSquares(
  x: readonly number[],
  y: readonly number[],
  meanX: number,
  meanY: number,
  slope: number,
): number {
  let squares = 0
  let largest = 0
  for (let i = 0; i < x.length; i++) {
    squares += (y[i]! - meanY - slope * (x[i]! - meanX)) ** 2
    largest = Math.max(largest, Math.abs(y[i]!))
  }
  return squares <= x.length * (4 * Number.EPSILON * largest) ** 2 ? 0 : squares
}
