import { assertComputable, assertFinite, assertNotNegative, assertPositive, ScienceError } from './guard'

/** What filling loses, in percent of what is taken; the rest reaches the jars. */
function kept(lossPercent: number): number {
  assertFinite('lossPercent', lossPercent)
  if (lossPercent < 0 || lossPercent >= 100) {
    throw new ScienceError('lossPercent', `must be from 0 to under 100, not ${lossPercent}`)
  }
  return 1 - lossPercent / 100
}

/** Grams that a number of jars take of a batch: jars × fill ÷ (1 − loss). */
export function gramsOfJars(jars: number, fillG: number, lossPercent: number): number {
  assertNotNegative('jars', jars)
  assertPositive('fillG', fillG)
  return assertComputable('fillG', (jars * fillG) / kept(lossPercent))
}

/** Whole jars that these grams fill. */
export function jarsFromGrams(grams: number, fillG: number, lossPercent: number): number {
  assertPositive('fillG', fillG)
  return assertComputable('fillG', Math.max(0, Math.floor((grams * kept(lossPercent)) / fillG)))
}

/** The fill, rounded down to a tenth of a gram, with which these grams reach for so many jars. */
export function fillFromGrams(grams: number, jars: number, lossPercent: number): number {
  assertPositive('jars', jars)
  return assertComputable('jars', Math.floor(((grams * kept(lossPercent)) / jars) * 10) / 10)
}
