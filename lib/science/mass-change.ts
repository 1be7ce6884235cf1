import { assertComputable, assertFinite, ScienceError } from './guard'

/**
 * Change of the fill's mass in percent of the fill, negative where it was lost: −(first gross − gross) ÷
 * (first gross − tare), the same unopened jar. All in g (or any one unit).
 */
export function massChangePercent(firstGrossG: number, tareG: number, grossG: number): number {
  assertFinite('firstGrossG', firstGrossG)
  assertFinite('tareG', tareG)
  assertFinite('grossG', grossG)
  if (firstGrossG <= tareG) {
    throw new ScienceError('firstGrossG', `must be above the tare of ${tareG}, but is ${firstGrossG}`)
  }
  return assertComputable('grossG', (-100 * (firstGrossG - grossG)) / (firstGrossG - tareG))
}
