import { separationOfLines } from '@/lib/science/photo-lines'
import type { LayerHeights, Separation } from '@/lib/science/separation'
import type { PhotoLinesOfReading } from '../schema/photo-lines'
import { ImpossibleEntry } from './impossible-entry'

/** Heights are sent to a tenth of a millimetre, lines to a tenth of a pixel. */
const roundingMm = 0.11

/** Separation as the lines on the photo say; the heights sent with them must say the same. */
export function separationOnPhoto({ lines }: PhotoLinesOfReading, typed: LayerHeights): Separation {
  const measured = separationOfLines(lines)
  const differs = (percent: number, mm: number) => Math.abs((percent / 100) * typed.totalMm - mm) > roundingMm
  if (differs(measured.topPercent, typed.topMm) || differs(measured.bottomPercent, typed.bottomMm))
    throw new ImpossibleEntry(
      'detail.photoLines',
      'The heights and the lines on the photo do not say the same. Measure on the photo again, or type the heights without it.',
    )
  return measured
}
