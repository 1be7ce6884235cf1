import { ScienceError } from '@/lib/science/guard'
import { separation, separationDetectionLimit } from '@/lib/science/separation'
import { separationOnPhoto } from './photo-lines'
import { percentOf } from '@/lib/science/percent'
import {
  computed,
  ImpossibleEntry,
  type EntryValue,
  type TypedEntry,
  type ValueContext,
} from './impossible-entry'

/** A ruler tells a millimetre, where the protocol names no finer one [practice]. */
export const plainRulerMm = 1

/** Half of what the ruler tells stands for a layer that is seen and too thin to be read [practice, no source]. */
export function hairlineMm(rulerMm: number): number {
  return rulerMm / 2
}

/** Layers of free oil and of water or serum; a cream layer and bleed are noted apart and do not count. */
export function layersValue(entry: TypedEntry, { jar, planned }: ValueContext): EntryValue {
  const { bleed, creamMm, isTopHairline, isBottomHairline, photoLines } = entry.detail
  const rulerMm = planned?.rulerMm ?? plainRulerMm
  const topMm = isTopHairline ? hairlineMm(rulerMm) : (entry.detail.topMm ?? 0)
  const bottomMm = isBottomHairline ? hairlineMm(rulerMm) : (entry.detail.bottomMm ?? 0)
  const totalMm = entry.detail.totalMm ?? jar.fillHeightMm
  const given = [entry.detail.topMm, entry.detail.bottomMm, bleed, creamMm]
  if (given.every((one) => one === undefined) && !isTopHairline && !isBottomHairline) {
    throw new ImpossibleEntry(
      'detail.topMm',
      'Give the height of the layer on top and below; 0 where there is none.',
    )
  }
  if (bleed !== undefined && (bleed < 0 || bleed > 4)) {
    throw new ImpossibleEntry('detail.bleed', 'Bleed is a whole number from 0 to 4.')
  }
  if (totalMm === null || totalMm <= 0) {
    throw new ImpossibleEntry('detail.totalMm', 'Give the height of the fill in mm, above 0.')
  }
  for (const [field, height, name] of [
    ['detail.topMm', topMm, 'The layer on top'],
    ['detail.bottomMm', bottomMm, 'The layer below'],
    ['detail.creamMm', creamMm ?? 0, 'The cream layer'],
  ] as const) {
    if (height < 0) throw new ImpossibleEntry(field, `${name} cannot be under 0 mm. Type it again.`)
    if (height > totalMm) {
      throw new ImpossibleEntry(
        field,
        `${name} cannot be ${height} mm high in a fill of ${totalMm} mm. Measure it again.`,
      )
    }
  }
  if (creamMm !== undefined && creamMm + topMm + bottomMm > totalMm) {
    throw new ImpossibleEntry(
      'detail.creamMm',
      `The cream layer and the layers beside it are higher than the fill of ${totalMm} mm. Measure them again.`,
    )
  }
  try {
    const heights = { totalMm, topMm, bottomMm }
    const { percent, topPercent, bottomPercent } = photoLines
      ? separationOnPhoto(photoLines, heights)
      : separation(heights)
    const isSeenOnly = (isTopHairline ?? topMm === 0) && (isBottomHairline ?? bottomMm === 0)
    const isUnderRuler =
      !photoLines && percent > 0 && (isSeenOnly || percent < separationDetectionLimit(totalMm, rulerMm))
    return {
      value: computed(percent),
      word: null,
      detail: {
        ...entry.detail,
        ...{ topMm, bottomMm, totalMm, topPercent, bottomPercent },
        ...(creamMm === undefined ? {} : { creamPercent: computed(percentOf(creamMm, totalMm)) }),
        // What cannot be told from none with the ruler is a hairline: more than none, and no number.
        ...(isUnderRuler ? { isUnderRuler, rulerMm } : {}),
      },
    }
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    if (photoLines)
      throw new ImpossibleEntry(
        'detail.photoLines',
        'The lines on the photo are out of order: fill top, edge of the oil, edge of the water and base follow one another downwards. Move them.',
      )
    throw new ImpossibleEntry(
      'detail.bottomMm',
      `Both layers together are higher than the fill of ${totalMm} mm. Measure them again.`,
    )
  }
}
