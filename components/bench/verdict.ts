import { shownValue } from '@/lib/study/rules/words'
import type { DraftEntry, Slot } from '@/components/bench/draft'
import type { BenchField } from '@/lib/bench/rules'
import { ImpossibleEntry, type EntryValue } from '@/lib/reading/rules/impossible-entry'
import { valueOf } from '@/lib/reading/rules/value'
import { changedConditions, conditionsIn } from '@/lib/reading/rules/conditions'
import { bandUsed, isNearEdge, nearerEdge } from '@/lib/science/band'
import { percentOf } from '@/lib/science/percent'
import { torqueDoubtWithin } from '@/lib/science/viscosity'

export type JarMeasures = {
  tareG: number | null
  grossG: number | null
  fillHeightMm: number | null
  instruments: { id: string; spindles: { name: string; constant: number }[] }[]
}

/** What the typed text means now: the value it makes, or why it cannot be, and where it lies. */
export type Verdict =
  | { state: 'empty' }
  | { state: 'impossible'; sentence: string; part: 'top' | 'bottom' | null }
  | {
      state: 'value'
      value: number
      isOut: boolean
      isEdge: boolean
      sentence: string | null
      advice: string | null
      /** What makes it hard to compare, said before it is kept. */
      doubts: string[]
    }

export function verdictOf(field: BenchField, entry: DraftEntry | undefined, jar: JarMeasures): Verdict {
  if (!entry) return { state: 'empty' }
  try {
    const last = field.last[0]?.value ?? null
    const { planned, initialDetail: initial, emulsionType } = field
    const spindles = jar.instruments.find((one) => one.id === entry.instrumentId)?.spindles ?? []
    const { value, detail } = valueOf(entry, { planned, jar, spindles, last, initial, emulsionType })
    return { ...judged(field, value), doubts: doubtsOf(field, entry, { value, detail }) }
  } catch (error) {
    if (!(error instanceof ImpossibleEntry)) throw error
    const part = error.field === 'detail.topMm' ? 'top' : error.field === 'detail.bottomMm' ? 'bottom' : null
    return { state: 'impossible', sentence: error.sentence, part }
  }
}

/** By the same rules as the server's. */
function doubtsOf(field: BenchField, { detail }: DraftEntry, read: Omit<EntryValue, 'word'>): string[] {
  const { torquePercent } = detail
  const { value } = read
  const room = field.band && field.initial !== null ? nearerEdge(field.band, field.initial) : Infinity
  const torque = torquePercent === undefined ? null : torqueDoubtWithin(torquePercent, room, value)
  const changed = changedConditions(conditionsIn({ ...detail, ...read.detail }), field.conditions)
  return [...(torque ? [`${torque}.`] : []), ...(changed ? [changed] : [])]
}

function judged(field: BenchField, value: number) {
  const { lower, upper } = field.band ?? { lower: null, upper: null }
  const isBelow = lower !== null && value < lower
  const isAbove = upper !== null && value > upper
  if (isBelow || isAbove) {
    const edge = isBelow ? lower : (upper ?? 0)
    const side = isBelow ? 'below' : 'above'
    const by =
      field.unit === '%' || edge === 0
        ? `${shownValue(field, Math.abs(value - edge))} ${field.unit === '%' ? 'points' : field.unit}`
        : `${percentOf(Math.abs(value - edge), edge).toFixed(1)} %`
    return {
      state: 'value' as const,
      value,
      isOut: true,
      isEdge: false,
      sentence: `${by} ${side} the band.`,
      advice: 'Measure a second jar before anyone worries.',
    }
  }
  const used = field.initial === null ? 0 : (bandUsed({ lower, upper }, field.initial, value) ?? 0)
  const isEdge = isNearEdge(used) && (lower !== null || upper !== null)
  return {
    state: 'value' as const,
    value,
    isOut: false,
    isEdge,
    sentence: isEdge ? `${Math.round(used * 100)} % of the band is used.` : null,
    advice: null,
  }
}

/** 5.20 to 5.80; at most 2.0; at least 38 600. */
export function bandText(field: BenchField): string {
  const { lower, upper } = field.band ?? { lower: null, upper: null }
  const f = (n: number) => shownValue(field, n)
  if (lower !== null && upper !== null) return `band ${f(lower)} to ${f(upper)}`
  if (upper !== null) return `allowed up to ${f(upper)}`
  if (lower !== null) return `allowed down to ${f(lower)}`
  return 'no band'
}

export function slotLabel(slot: Slot): string {
  if (slot.kind === 'layer') return slot.part === 'top' ? 'Oil on top' : 'Water below'
  if (slot.kind === 'gross') return 'Mass'
  return slot.field.replicates > 1 ? `${slot.field.label} ${slot.replicate}` : slot.field.label
}

export function slotUnit(slot: Slot): string {
  if (slot.kind === 'layer') return 'mm'
  if (slot.kind === 'torque') return '%'
  if (slot.kind === 'gross') return 'g'
  return slot.field.unit
}
