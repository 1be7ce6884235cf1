import { dropCount, dropsOf, readDrops } from '@/lib/batch/rules/droplets'
import { dropsOnPhoto } from './drops-on-photo'
import {
  computed,
  ImpossibleEntry,
  type EntryValue,
  type TypedEntry,
  type ValueContext,
} from './impossible-entry'

/** The diameter that the protocol's band is about, of the drops that were counted or of one size that stands for all. */
export function dropletsValue(entry: TypedEntry, { planned }: ValueContext): EntryValue {
  const counted = readDrops(entry.typed)
  if (typeof counted === 'string') throw new ImpossibleEntry('typed', counted)
  const { photoDrops } = entry.detail
  const sized = photoDrops ? dropsOnPhoto(photoDrops, counted) : counted
  const drops = dropsOf(sized)
  if (!drops) return { value: sized.diametersUm[0]!, word: null, detail: entry.detail }
  const measure = planned?.dropletMeasure ?? 'd50v'
  return {
    value: computed(drops[measure]),
    word: null,
    detail: { ...entry.detail, measure, drops, count: dropCount(drops) },
  }
}
