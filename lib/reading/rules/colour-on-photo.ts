import { ScienceError } from '@/lib/science/guard'
import type { Lab } from '@/lib/science/colour'
import { colourByGrey } from '@/lib/science/photo-colour'
import type { PhotoColourOfReading } from '../schema/photo-colour'
import { ImpossibleEntry } from './impossible-entry'

/** Numbers are sent to a tenth, and two decoders of one JPEG differ by a little. */
const apart = 0.6

/** The colour as the patches on the photo say; the numbers sent with them must say the same. */
export function labOnPhoto({ patches, greyL }: PhotoColourOfReading, typed: Lab): Lab {
  try {
    const { lab } = colourByGrey({ ...patches, greyL })
    const differs = (['L', 'a', 'b'] as const).some((part) => Math.abs(lab[part] - typed[part]) > apart)
    if (differs)
      throw new ImpossibleEntry(
        'detail.photoColour',
        'The numbers and the patches on the photo do not say the same. Take the colour from the photo again, or type it without one.',
      )
    return lab
  } catch (thrown) {
    if (!(thrown instanceof ScienceError)) throw thrown
    throw new ImpossibleEntry('detail.photoColour', sentenceOf(thrown))
  }
}

/** The sentence alone; the field is named by where it stands. */
export function sentenceOf({ field, message }: ScienceError): string {
  return message.slice(field.length + 2)
}
