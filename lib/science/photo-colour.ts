import { convertLab65ToXyz65, convertLrgbToRgb, convertRgbToLab65 } from 'culori/fn'
import type { Lab } from './colour'
import { assertFinite, ScienceError } from './guard'
import { luminance, type Linear, type Patch } from './patch'

/** L* of a grey card that reflects 18 %, by CIE 15: 116 × 0.18^(1/3) − 16 [common practice that photographers' cards do]. */
export const greyCardL = 49.5

/** What a patch must be like to be measured [common practice, no source]. */
export const patchLimits = {
  /** Fewer pixels let noise through. */
  pixels: 64,
  /** Share of the pixels that may stand at an end of the scale. */
  clipped: 0.01,
  /** Of the grey card: how far a quarter may lie from the whole, and what is worth a second look. */
  unevenness: { refused: 0.12, doubtful: 0.05 },
  /** Standard deviation of luminance ÷ mean, of either patch. */
  spread: { refused: 0.35, doubtful: 0.12 },
  /** The strongest channel of the grey card ÷ the weakest: what lamps do, and what is no grey. */
  cast: { refused: 4, doubtful: 1.8 },
  /** The darkest grey, in linear light. */
  grey: 0.008,
}

export type PhotoColour = {
  lab: Lab
  /** Why it had better be taken again; none where nothing speaks against it. */
  reasons: string[]
}

/**
 * CIE L*a*b* (D65, 2°) of a sample beside a grey card on one photo. In linear light each channel of the sample is
 * multiplied by what makes the card neutral with its known L*: white balance and exposure in one. Then sRGB's matrix
 * (IEC 61966-2-1) to XYZ and CIE 15 to L*a*b*, both as culori has them. Throws, with a sentence, where a patch is burnt
 * out, drowned, too small, too noisy or unevenly lit. An estimate even then: a camera's curve is no sRGB to the letter,
 * gloss and coloured surroundings add to it.
 */
export function colourByGrey(input: { grey: Patch; sample: Patch; greyL: number }): PhotoColour {
  const { grey, sample, greyL } = input
  assertFinite('greyL', greyL)
  if (greyL < 10 || greyL > 98) throw new ScienceError('greyL', 'A grey card has an L* of 10 to 98.')
  refuse('sample', 'The sample', sample)
  refuse('grey', 'The grey card', grey)
  if (luminance(grey.mean) < patchLimits.grey || Math.min(...grey.mean) <= 0)
    throw new ScienceError('grey', 'The grey card lies in the dark. Take the photo in more light.')
  if (grey.unevenness > patchLimits.unevenness.refused)
    throw new ScienceError(
      'grey',
      'The light on the grey card is not even. Turn the card to the light, or choose a place without shadow or gloss.',
    )
  const cast = Math.max(...grey.mean) / Math.min(...grey.mean)
  if (cast > patchLimits.cast.refused)
    throw new ScienceError('grey', 'This patch is no grey. Put it on the grey card.')

  const target = convertLab65ToXyz65({ l: greyL, a: 0, b: 0 }).y
  const [r, g, b] = sample.mean.map((v, c) => (v * target) / grey.mean[c]!) as Linear
  const { l: L, a: aStar, b: bStar } = convertRgbToLab65(convertLrgbToRgb({ r, g, b }))
  if (L > 101)
    throw new ScienceError(
      'sample',
      'The sample comes out brighter than white. The card and the sample do not stand in one light, or the card’s L* is another.',
    )
  const doubtful = [
    grey.unevenness > patchLimits.unevenness.doubtful && 'The light on the grey card is not quite even.',
    cast > patchLimits.cast.doubtful && 'The light is strongly coloured; daylight tells colours better.',
    grey.spread > patchLimits.spread.doubtful && 'The grey card’s patch is noisy or holds something else.',
    sample.spread > patchLimits.spread.doubtful && 'The sample’s patch is noisy or holds gloss or edges.',
  ]
  return {
    lab: { L: Math.min(100, L), a: aStar, b: bStar },
    reasons: doubtful.filter((one) => one !== false),
  }
}

function refuse(field: 'grey' | 'sample', name: string, patch: Patch): void {
  if (patch.pixels < patchLimits.pixels)
    throw new ScienceError(field, `${name}: the patch is too small to tell a colour. Make it larger.`)
  if (patch.clipped > patchLimits.clipped)
    throw new ScienceError(
      field,
      `${name} is burnt out or black, so its colour left no trace. Take the photo with other light, or move the patch.`,
    )
  if (patch.spread > patchLimits.spread.refused)
    throw new ScienceError(
      field,
      `${name}: the patch holds more than one thing. Make it smaller, or move it.`,
    )
}
