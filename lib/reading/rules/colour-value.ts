import { colour, type Lab } from '@/lib/science/colour'
import { readTyped } from '../schema/typed'
import { labOnPhoto } from './colour-on-photo'
import {
  computed,
  ImpossibleEntry,
  type EntryValue,
  type TypedEntry,
  type ValueContext,
} from './impossible-entry'

/** L*, a* and b* as they are typed, "72.4 1.2 14.8"; null where they are not three numbers. */
export function readLab(typed: string): Lab | null {
  const parts = typed.trim().split(/[;/\s]+/)
  const [L, a, b] = parts.map(readTyped)
  if (parts.length !== 3 || L == null || a == null || b == null) return null
  return { L, a, b }
}

/** How far the colour lies from the batch's own initial, by CIEDE2000; the initial itself is where it is told from. */
export function colourValue(entry: TypedEntry, { initial }: ValueContext): EntryValue {
  const typed = readLab(entry.typed)
  if (!typed) {
    throw new ImpossibleEntry('typed', 'A colour is three numbers, L*, a* and b*, such as 72.4 1.2 14.8.')
  }
  const { photoColour } = entry.detail
  const lab = photoColour ? labOnPhoto(photoColour, typed) : typed
  if (lab.L < 0 || lab.L > 100) {
    throw new ImpossibleEntry('typed', 'L* runs from 0, black, to 100, white. Read it again.')
  }
  if (Math.max(Math.abs(lab.a), Math.abs(lab.b)) > 128) {
    throw new ImpossibleEntry('typed', 'a* and b* run from −128 to 128. Read them again.')
  }
  // What a photo tells is an estimate, whether or not it was said.
  const said = { ...entry.detail, ...(photoColour ? { isEstimate: true } : {}), lab: rounded(lab) }
  if (initial === 'self') return { value: 0, word: null, detail: said }
  const reference = labIn(initial?.['lab'])
  if (!reference) {
    throw new ImpossibleEntry(
      'typed',
      "The batch's own colour was not read at the start, so there is nothing to tell a difference from. Leave it out.",
    )
  }
  const { deltaE00, deltaE76 } = colour({ reference, sample: lab })
  return {
    value: computed(deltaE00),
    word: null,
    detail: { ...said, reference, deltaE76: computed(deltaE76) },
  }
}

function rounded({ L, a, b }: Lab): Lab {
  return { L: computed(L), a: computed(a), b: computed(b) }
}

export function labIn(value: unknown): Lab | null {
  const { L, a, b } = (value ?? {}) as Record<string, unknown>
  return typeof L === 'number' && typeof a === 'number' && typeof b === 'number' ? { L, a, b } : null
}
