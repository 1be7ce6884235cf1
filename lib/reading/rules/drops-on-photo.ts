import type { Counted } from '@/lib/batch/rules/droplets'
import { ScienceError } from '@/lib/science/guard'
import { diametersOnPhoto } from '@/lib/science/photo-drops'
import type { PhotoDropsOfReading } from '../schema/photo-drops'
import { computed, ImpossibleEntry } from './impossible-entry'

/** Diameters as the points on the photo and its scale bar say; those sent with them, four digits each, must say the same. */
export function dropsOnPhoto({ bar, drops }: PhotoDropsOfReading, { diametersUm, counts }: Counted): Counted {
  const measured = diametersOf(bar, drops)
  const isSame =
    measured.length === diametersUm.length &&
    counts.every((count) => count === 1) &&
    measured.every((um, i) => Math.abs(um - diametersUm[i]!) <= 0.002 * um)
  if (!isSame)
    throw new ImpossibleEntry(
      'detail.photoDrops',
      'The diameters and the points on the photo do not say the same. Measure on the photo again, or type the diameters without it.',
    )
  return { diametersUm: measured.map(computed), counts }
}

function diametersOf(bar: PhotoDropsOfReading['bar'], drops: PhotoDropsOfReading['drops']): number[] {
  try {
    return diametersOnPhoto(bar, drops)
  } catch (thrown) {
    if (!(thrown instanceof ScienceError)) throw thrown
    throw new ImpossibleEntry(
      'detail.photoDrops',
      'The scale bar or a drop is too short on the photo. Set its two ends apart.',
    )
  }
}
