import type { BenchField } from '@/lib/bench/rules'
import { kindEntry, layersEntry } from '@/components/bench/kind-entry'
import { newId } from '@/lib/db/id'
import { conditionKeys, type Conditions } from '@/lib/reading/rules/conditions'
import type { EntryDetail } from '@/lib/reading/schema/entry'
import { readTyped } from '@/lib/reading/schema/typed'

/** One input of the jar's screen. Layers have two; a replicate is an input of its own. */
export type Slot = {
  key: string
  kind: 'number' | 'torque' | 'gross' | 'layer' | 'word' | 'type' | 'colour' | 'droplets' | 'centrifuge'
  field: BenchField
  replicate: number
  part?: 'top' | 'bottom'
}

/** What of a reading's detail says where on a photo it was measured. */
export type OnPhoto = Pick<EntryDetail, 'photoLines' | 'photoColour' | 'photoDrops'>

export type Draft = {
  texts: Record<string, string>
  /** Client-made ids of the readings, so that sending again saves once. */
  ids: Record<string, string>
  confirmed: string[]
  instruments: Record<string, string>
  /** What differs from the initial's conditions, by attribute. */
  conditions: Record<string, Partial<Conditions>>
  /** Attributes of which the value itself is typed instead of the torque. */
  direct: string[]
  note: string
  /** By attribute and replicate, what was marked on a photo to measure it; typed over, it is not from a photo any more. */
  onPhoto?: Record<string, OnPhoto>
  begunAt: string
  /** The field in hand, so that one comes back to it after signing in again. */
  at?: string
}

export function emptyDraft(now: string): Draft {
  return {
    texts: {},
    ids: {},
    confirmed: [],
    instruments: {},
    conditions: {},
    direct: [],
    note: '',
    begunAt: now,
  }
}

/** `direct` are attributes of which the value is typed instead of the torque. */
export function slotsOf(fields: BenchField[], hasMass: boolean, direct: readonly string[] = []): Slot[] {
  return fields.flatMap((field): Slot[] => {
    const each = Array.from({ length: field.replicates }, (_, i) => i + 1)
    if (field.kind === 'layers')
      return [
        { key: `${field.attribute}.top`, kind: 'layer', field, replicate: 1, part: 'top' },
        { key: `${field.attribute}.bottom`, kind: 'layer', field, replicate: 1, part: 'bottom' },
      ]
    const kind =
      field.kind !== 'torque' && field.kind !== 'number'
        ? field.kind
        : field.kind === 'torque' && field.viscosity && !direct.includes(field.attribute)
          ? 'torque'
          : field.attribute === 'mass' && hasMass
            ? 'gross'
            : 'number'
    return each.map((replicate) => ({ key: `${field.attribute}.${replicate}`, kind, field, replicate }))
  })
}

export type DraftEntry = {
  id: string
  attribute: BenchField['attribute']
  replicate: number
  typed: string
  detail: EntryDetail
  instrumentId?: string
  isConfirmed: boolean
}

/** What would be sent: one entry for each field that has something typed. Both layers make one entry. */
export function entriesOf(
  slots: Slot[],
  draft: Draft,
  fillHeightMm: number | null,
  instrumentOf: (slot: Slot) => string | null,
): DraftEntry[] {
  const seen = new Set<string>()
  return slots.flatMap((slot): DraftEntry[] => {
    const id = `${slot.field.attribute}.${slot.replicate}`
    if (seen.has(id)) return []
    seen.add(id)
    const text = (key: string) => (draft.texts[key] ?? '').trim()
    const instrument = draft.instruments[id] ?? instrumentOf(slot)
    const base = {
      id: draft.ids[id] ?? newId(),
      attribute: slot.field.attribute,
      replicate: slot.replicate,
      isConfirmed: draft.confirmed.includes(id),
      ...(instrument ? { instrumentId: instrument } : {}),
    }
    if (slot.kind === 'layer') {
      const read = layersEntry(slot.field.attribute, text, fillHeightMm)
      if (!read) return []
      const onPhoto = draft.onPhoto?.[id]
      if (!onPhoto) return [{ ...base, ...read }]
      return [{ ...base, typed: `${read.typed}, on the photo`, detail: { ...read.detail, ...onPhoto } }]
    }
    const typed = text(slot.key)
    if (typed === '') return []
    if (slot.kind === 'word') return [{ ...base, typed, detail: { word: typed } }]
    const value = readTyped(typed) ?? NaN
    if (slot.kind === 'torque')
      return [{ ...base, typed, detail: { torquePercent: value, ...conditionsUsed(slot, draft) } }]
    if (slot.kind === 'gross') return [{ ...base, typed, detail: { grossG: value } }]
    const read = kindEntry(slot, typed, text)
    return [
      {
        ...base,
        ...read,
        detail: { ...read.detail, ...conditionsUsed(slot, draft), ...draft.onPhoto?.[id] },
      },
    ]
  })
}

/** The initial's conditions with what is said to differ; only what is known of them. */
export function conditionsUsed(slot: Slot, draft: Draft): EntryDetail {
  const { attribute, conditions } = slot.field
  const used: Partial<Conditions> = { ...conditions, ...draft.conditions[attribute] }
  const known = conditionKeys(attribute).filter((key) => (used[key] ?? null) !== null)
  return Object.fromEntries(known.map((key) => [key, used[key]]))
}

/** Every entry gets its id once, when it is first typed. */
export function withIds(draft: Draft, slots: Slot[]): Draft {
  const ids = { ...draft.ids }
  for (const slot of slots) {
    const id = `${slot.field.attribute}.${slot.replicate}`
    ids[id] ??= newId()
  }
  return { ...draft, ids }
}

/** Inputs that stand side by side: the replicates of an attribute, the layers of a jar. */
export function groupsOf<T extends { slot: Slot }>(tabs: readonly T[]): T[][] {
  const keys = [...new Set(tabs.map((tab) => tab.slot.field.attribute))]
  return keys.map((key) => tabs.filter((tab) => tab.slot.field.attribute === key))
}
