import type { PlannedAttribute } from '@/lib/protocol/schema'
import type { AttributeKey } from '../schema/attributes'
import type { EntryDetail } from '../schema/entry'

/** What must be known of the jar and the protocol to make a value of what was typed. */
export type ValueContext = {
  planned: Partial<PlannedAttribute> | null
  jar: { tareG: number | null; grossG: number | null; fillHeightMm: number | null }
  /** Of the instrument that was used. */
  spindles: { name: string; constant: number }[]
  /** The value before this one, to say what may have slipped. */
  last: number | null
  /** How the batch's own initial of this attribute was come by; `self` where this is the initial. */
  initial?: Record<string, unknown> | 'self' | null
  /** What the batch is, where no initial says it. */
  emulsionType?: string | null
}

export type TypedEntry = { attribute: AttributeKey; typed: string; detail: EntryDetail }
export type EntryValue = { value: number; word: string | null; detail: Record<string, unknown> }

/** Why an entry cannot be so, by the field of the entry that says it: `typed` or `detail.topMm`. */
export class ImpossibleEntry extends Error {
  constructor(
    readonly field: string,
    readonly sentence: string,
  ) {
    super(sentence)
  }
}

/** What was computed from typed numbers, without the noise of binary fractions: 0.9 of 60 mm is 1.5 %, not 1.4999999999999998. */
export function computed(value: number): number {
  return Number(value.toPrecision(12))
}
