import fCdf from '@stdlib/stats-base-dists-f-cdf'
import tCdf from '@stdlib/stats-base-dists-t-cdf'
import tQuantileOf from '@stdlib/stats-base-dists-t-quantile'

/** Quantile of Student's t; good to about 2e-11. */
export function tQuantile(probability: number, df: number): number {
  return tQuantileOf(probability, df)
}

/** P(T > t). Taken from the lower tail, so that small probabilities keep their digits. */
export function tUpperTail(t: number, df: number): number {
  return tCdf(-t, df)
}

/** P(|T| > |t|). */
export function tTwoTails(t: number, df: number): number {
  return Math.min(1, 2 * tCdf(-Math.abs(t), df))
}

/** P(F > f), by the reciprocal of F, for the same reason. */
export function fUpperTail(f: number, df1: number, df2: number): number {
  if (f <= 0) return 1
  return fCdf(1 / f, df2, df1)
}
