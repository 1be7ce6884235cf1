import { separationDetectionLimit } from '@/lib/science/separation'

/** Bleed on the wall where there is no layer, 0 to 4, as the jar's own screen names it. */
export const bleedWords = ['none', 'film', 'beads', 'drops', 'a run'] as const

export type SeenLayers = {
  totalMm?: number
  isUnderRuler?: boolean
  rulerMm?: number
  bleed?: number
  creamPercent?: number
}

/** What is more than none and too thin for the ruler is no number: "hairline, under 1.7 %". */
export function hairlineText({ isUnderRuler, rulerMm = 1, totalMm }: SeenLayers): string | null {
  if (!isUnderRuler) return null
  return totalMm ? `hairline, under ${separationDetectionLimit(totalMm, rulerMm).toFixed(1)} %` : 'hairline'
}

/** What is noted beside the layers and does not count into them. */
export function besideLayers({ bleed, creamPercent }: Pick<SeenLayers, 'bleed' | 'creamPercent'>): string[] {
  return [
    ...(bleed ? [`bleed ${bleed} of 4 (${bleedWords[bleed]})`] : []),
    ...(creamPercent ? [`cream layer ${creamPercent.toFixed(1)} %`] : []),
  ]
}
