import { assertFinite, ScienceError } from './guard'

export type CertifiedValue = { temperatureC: number; value: number }

/** Beyond the certificate's first and last temperature its value still holds this far [practice]. */
const beyondC = 1

/**
 * The value that a bottle's certificate gives at a temperature: linear between its own lines, and nothing further than
 * 1 °C outside them. Any unit: pH of a buffer, mPa·s of a check fluid.
 */
export function certifiedValue(lines: readonly CertifiedValue[], temperatureC: number): number {
  assertFinite('temperatureC', temperatureC)
  const sorted = lines.toSorted((a, b) => a.temperatureC - b.temperatureC)
  const [first, last] = [sorted[0], sorted.at(-1)]
  if (!first || !last) throw new ScienceError('lines', 'hold no value')
  if (temperatureC < first.temperatureC - beyondC || temperatureC > last.temperatureC + beyondC) {
    throw new ScienceError(
      'temperatureC',
      `must lie where the certificate has values, ${first.temperatureC} to ${last.temperatureC} °C, not ${temperatureC}`,
    )
  }
  const above = sorted.findIndex((line) => line.temperatureC >= temperatureC)
  if (above === -1) return last.value
  if (above === 0) return first.value
  const [low, high] = [sorted[above - 1]!, sorted[above]!]
  const share = (temperatureC - low.temperatureC) / (high.temperatureC - low.temperatureC)
  return (1 - share) * low.value + share * high.value
}
