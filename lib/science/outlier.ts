import { tQuantile } from './distributions'
import { assertComputable, assertFinite, assertNumbers, ScienceError } from './guard'
import { mean, sampleStandardDeviation } from './mean'

export type Outlier = {
  /** null where all values are equal. */
  g: number | null
  critical: number
  /** Of the value furthest from the mean, from 0. */
  index: number
  outlier: boolean
}

/** Grubbs' test for one outlier, two-sided: G = max|x − mean|/s against its critical value at `alpha` (0.05). */
export function outlier({ values, alpha = 0.05 }: { values: number[]; alpha?: number }): Outlier {
  assertNumbers('values', values, 3)
  assertFinite('alpha', alpha)
  if (alpha <= 0 || alpha >= 1) throw new ScienceError('alpha', `must lie between 0 and 1, not ${alpha}`)
  const centre = mean(values)
  const sd = sampleStandardDeviation(values)
  const distances = values.map((value) => Math.abs(value - centre))
  const index = distances.reduce((furthest, d, i) => (d > distances[furthest]! ? i : furthest), 0)
  const g = sd === 0 || values.every((value) => value === values[0]) ? null : distances[index]! / sd
  const critical = grubbsCritical(values.length, alpha)
  return assertComputable('values', { g, critical, index, outlier: g !== null && g > critical })
}

/** (n − 1)/√n · √(t²/(n − 2 + t²)), t the upper alpha/(2n) quantile with n − 2 degrees of freedom. */
export function grubbsCritical(n: number, alpha: number): number {
  const t = tQuantile(1 - alpha / (2 * n), n - 2)
  // t²/(n − 2 + t²) written so that a huge t cannot overflow.
  return ((n - 1) / Math.sqrt(n)) * Math.sqrt(1 / (1 + (n - 2) / t / t))
}
