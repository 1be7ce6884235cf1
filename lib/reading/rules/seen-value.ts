import { centrifuge } from '@/lib/science/centrifuge'
import type { Attribute } from '../schema/attributes'
import { outsidePhases, type OutsidePhase } from '../schema/entry'
import { readTyped } from '../schema/typed'
import {
  computed,
  ImpossibleEntry,
  type EntryValue,
  type TypedEntry,
  type ValueContext,
} from './impossible-entry'

/** What a tube shows: nothing, a trace too thin for a scale, or a layer in mm. */
export const tubeWords = ['none', 'trace'] as const

/** A trace is more than none and no number: it counts as this much, in mm [practice, no source]. */
export const traceMm = 0.2

/** Dilution, dye and conductivity each tell which phase is outside; only a change of it is a value [book]. */
export function typeValue(entry: TypedEntry, { initial, emulsionType }: ValueContext): EntryValue {
  const found = outsidePhases.find((phase) => phase === entry.typed.trim())
  if (!found) {
    throw new ImpossibleEntry('typed', `The test shows one of: ${outsidePhases.join(', ')}. Choose one.`)
  }
  const isClear = found !== 'not clear'
  if (initial === 'self') {
    if (!isClear) {
      throw new ImpossibleEntry('typed', 'A type that is not clear is nothing to compare with. Test again.')
    }
    return { value: 0, word: found, detail: { ...entry.detail, found } }
  }
  const before = foundIn(initial) ?? outsideOf(emulsionType ?? null)
  if (!before) {
    throw new ImpossibleEntry(
      'typed',
      "The batch's own type was not told at the start, so a change cannot be told. Leave it out.",
    )
  }
  const value = !isClear ? 1 : found === before ? 0 : 2
  return { value, word: found, detail: { ...entry.detail, found, before } }
}

function foundIn(initial: Exclude<ValueContext['initial'], 'self'>): OutsidePhase | null {
  const found = initial?.['found']
  return outsidePhases.find((phase) => phase === found) ?? null
}

/** A water-in-silicone cream has its oil outside as well. */
export function outsideOf(emulsionType: string | null): OutsidePhase | null {
  if (emulsionType === 'oil-in-water') return 'water outside'
  return emulsionType === 'water-in-oil' || emulsionType === 'water-in-silicone' ? 'oil outside' : null
}

/** What came out under the force of the protocol's rotor, or of the one that was used. */
export function centrifugeValue(
  entry: TypedEntry,
  attribute: Attribute,
  { planned }: ValueContext,
): EntryValue {
  const { rpm, radiusMm, minutes } = { ...planned?.centrifuge, ...entry.detail }
  if (!rpm || rpm > 100_000) throw new ImpossibleEntry('detail.rpm', 'Give the speed of the rotor in rpm.')
  if (!radiusMm || radiusMm > 1000) {
    throw new ImpossibleEntry('detail.radiusMm', 'Give the radius of the rotor in mm.')
  }
  if (!minutes) throw new ImpossibleEntry('detail.minutes', 'Give the minutes that it ran.')
  const typed = entry.typed.trim().toLowerCase()
  const layer = typed === 'none' ? 0 : typed === 'trace' ? traceMm : readTyped(typed)
  if (layer === null || layer < 0 || layer > attribute.possible.upper) {
    throw new ImpossibleEntry(
      'typed',
      `A tube shows none, a trace, or a layer of up to ${attribute.possible.upper} mm. Read it again.`,
    )
  }
  const { rcf } = centrifuge({ rpm, radiusMm })
  return {
    value: layer,
    word: typed === 'none' || typed === 'trace' ? typed : null,
    detail: { ...entry.detail, rpm, radiusMm, minutes, rcf: computed(rcf) },
  }
}
