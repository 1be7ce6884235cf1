import { assertComputable, assertNotNegative, assertPositive } from './guard'
import { kelvin } from './kelvin'

export type AcceleratedAgeInput = {
  storageC: number
  acceleratedC: number
  q10: number
  targetMonths: number
}
export type AcceleratedAge = { factor: number; acceleratedMonths: number }

/** Months at the accelerated temperature that stand for `targetMonths` in storage: factor = q10^((T_acc − T_store)/10). */
export function acceleratedAge({
  storageC,
  acceleratedC,
  q10,
  targetMonths,
}: AcceleratedAgeInput): AcceleratedAge {
  kelvin('storageC', storageC)
  kelvin('acceleratedC', acceleratedC)
  assertPositive('q10', q10)
  assertNotNegative('targetMonths', targetMonths)
  const factor = Math.pow(q10, (acceleratedC - storageC) / 10)
  return assertComputable('q10', { factor, acceleratedMonths: targetMonths / factor })
}
