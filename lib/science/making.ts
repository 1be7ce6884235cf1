import { assertComputable, assertFinite, assertNotNegative, assertPositive, ScienceError } from './guard'

/** Balances show at most 0.0001 g: what binary fractions add below a millionth is noise. */
const clean = (grams: number) => Math.round(grams * 1e6) / 1e6

/** What went in: the balance's figure less the vessel's. */
export function netGrams(grossG: number, tareG: number): number {
  assertNotNegative('grossG', grossG)
  assertNotNegative('tareG', tareG)
  return assertComputable('grossG', clean(grossG - tareG))
}

/** Portions of one line, or lines of a batch, together. */
export function totalGrams(portions: readonly number[]): number {
  let total = 0
  portions.forEach((grams, i) => {
    assertNotNegative(`portions[${i}]`, grams)
    total += grams
  })
  return assertComputable('portions', clean(total))
}

/** The size of a batch of which this share comes out as grams that can be filled: whole grams, rounded up. */
export function batchSizeFor(gramsEach: readonly number[], yieldPercent: number): number {
  assertPositive('yieldPercent', yieldPercent)
  if (yieldPercent > 100) throw new ScienceError('yieldPercent', `must be at most 100, not ${yieldPercent}`)
  return assertComputable('gramsEach', Math.ceil(clean(totalGrams(gramsEach) / (yieldPercent / 100))))
}

/** Minutes between two instants in milliseconds, to a tenth. */
export function minutesBetween(fromMs: number, toMs: number): number {
  assertFinite('fromMs', fromMs)
  assertFinite('toMs', toMs)
  if (toMs < fromMs) throw new ScienceError('toMs', 'lies before the beginning')
  return Math.round((toMs - fromMs) / 6_000) / 10
}

/** Whether a value lies further from what was asked than is allowed, its ends included. */
export function isBeyond(actual: number, asked: number, allowed: number): boolean {
  assertFinite('actual', actual)
  assertFinite('asked', asked)
  assertPositive('allowed', allowed)
  return Math.abs(actual - asked) > allowed + 1e-9
}
