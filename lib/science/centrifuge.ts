import { assertComputable, assertNotNegative, assertPositive } from './guard'

/** Per mm and (1/min)², in multiples of g [book]. */
const constant = 1.118e-6

/** Relative centrifugal force: RCF = 1.118·10⁻⁶ · r(mm) · rpm². */
export function centrifuge({ rpm, radiusMm }: { rpm: number; radiusMm: number }): { rcf: number } {
  assertNotNegative('rpm', rpm)
  assertPositive('radiusMm', radiusMm)
  return assertComputable('rpm', { rcf: constant * radiusMm * rpm * rpm })
}
