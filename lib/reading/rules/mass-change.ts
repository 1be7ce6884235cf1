/**
 * Change of the fill's mass in percent of the fill, negative where it was lost: −(first gross − gross) ÷
 * (first gross − tare), the same unopened jar. All in g.
 */
export function massChangePercent(firstGrossG: number, tareG: number, grossG: number): number {
  return (-100 * (firstGrossG - grossG)) / (firstGrossG - tareG)
}
