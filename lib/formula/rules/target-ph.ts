import { readDecimal } from '@/lib/number/rules'

/** The pH a formula is meant to have: one value where both ends are the same. */
export type TargetPh = { low: number; high: number }

type Columns = { targetPhLow: number | null; targetPhHigh: number | null }

/** Null where a version has none. */
export function targetPhOf({ targetPhLow: low, targetPhHigh: high }: Columns): TargetPh | null {
  return low === null || high === null ? null : { low, high }
}

export function targetPhColumns(target: TargetPh | null): Columns {
  return { targetPhLow: target?.low ?? null, targetPhHigh: target?.high ?? null }
}

/** "5.50", or "5.20 to 5.80". */
export function targetPhText(target: TargetPh | null): string {
  if (!target) return ''
  const ends = [...new Set([target.low, target.high])]
  return ends.map((end) => end.toFixed(2)).join(' to ')
}

/** Reads "5,5", "5.2 to 5.8" or "5.2-5.8"; a sentence where it is neither a value nor a range. */
export function readTargetPh(typed: string): { target: TargetPh | null } | { sentence: string } {
  if (!typed.trim()) return { target: null }
  const ends = typed.trim().split(/\s*(?:\bto\b|[-\u2010-\u2015\u2212])\s*/i)
  const [low, high] = [ends[0], ends.at(-1)].map((end) => readDecimal(end ?? ''))
  if (ends.length > 2 || typeof low !== 'number' || typeof high !== 'number')
    return { sentence: 'Type the pH as 5.50, or as a range such as 5.20 to 5.80.' }
  if (low < 0 || high > 14) return { sentence: 'A pH lies between 0 and 14.' }
  if (low > high) return { sentence: 'The range begins with its lower end, such as 5.20 to 5.80.' }
  return { target: { low, high } }
}
