import { assertFinite, ScienceError } from './guard'

/** A part in percent of the size of a whole, which may carry a sign of its own. */
export function percentOf(part: number, whole: number): number {
  assertFinite('part', part)
  assertFinite('whole', whole)
  if (whole === 0) throw new ScienceError('whole', 'is 0, so nothing is a percentage of it')
  return (100 * part) / Math.abs(whole)
}

/** How far a value lies from a reference, in percent of that. */
export function percentFrom(value: number, reference: number): number {
  return percentOf(value - reference, reference)
}
