import fCdf from '@stdlib/stats-base-dists-f-cdf'
import tCdf from '@stdlib/stats-base-dists-t-cdf'
import tQuantileOf from '@stdlib/stats-base-dists-t-quantile'

const knownQuantiles = new Map<number, Map<number, number>>()
/** More whole degrees of freedom than a study has times; others are computed anew, so that memory stays flat. */
const mostKept = 500

/** Quantile of Student's t; good to about 2e-11. Kept per probability and df: every jar asks for the same few. */
export function tQuantile(probability: number, df: number): number {
  if (!Number.isInteger(df) || df > mostKept) return tQuantileOf(probability, df)
  let known = knownQuantiles.get(probability)
  if (known === undefined) {
    known = new Map()
    if (knownQuantiles.size < mostKept) knownQuantiles.set(probability, known)
  }
  let value = known.get(df)
  if (value === undefined) {
    value = tQuantileOf(probability, df)
    known.set(df, value)
  }
  return value
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
