import type { Slot } from '@/components/bench/draft'
import { readTyped } from '@/lib/reading/schema/typed'
import type { EntryDetail } from '@/lib/reading/schema/entry'

type Read = { typed: string; detail: EntryDetail }

/** What is asked beside a field, such as the rotor's speed, is kept in the draft under the field's own key. */
export function besideKey(slot: Pick<Slot, 'field' | 'replicate'>, what: string): string {
  return `${slot.field.attribute}.${slot.replicate}.${what}`
}

export const typeMethods = ['dilution', 'dye', 'conductivity'] as const

/** Text and details of a field that is no single number. */
export function kindEntry(slot: Slot, typed: string, text: (key: string) => string): Read {
  const beside = (what: string) => text(besideKey(slot, what))
  switch (slot.kind) {
    case 'type': {
      const typeMethod = typeMethods.find((method) => method === beside('method'))
      return { typed, detail: typeMethod ? { typeMethod } : {} }
    }
    case 'colour':
      return { typed, detail: beside('estimate') ? { isEstimate: true } : {} }
    case 'centrifuge':
      return {
        typed,
        detail: Object.fromEntries(
          rotorParts.flatMap((part) => {
            const number = readTyped(beside(part))
            return number === null ? [] : [[part, number]]
          }),
        ),
      }
    default:
      return { typed, detail: {} }
  }
}

export const rotorParts = ['rpm', 'radiusMm', 'minutes'] as const

const hairline = 'hairline'

/** A layer as the ruler reads it: a number, or one that is seen and too thin to be told. */
function layer(text: string, part: 'top' | 'bottom'): EntryDetail {
  if (text === hairline) return part === 'top' ? { isTopHairline: true } : { isBottomHairline: true }
  const height = readTyped(text || '0') ?? NaN
  return part === 'top' ? { topMm: height } : { bottomMm: height }
}

/** Both layers, and what is noted beside them: bleed where there is no layer, a cream layer apart. */
export function layersEntry(
  attribute: string,
  text: (key: string) => string,
  totalMm: number | null,
): Read | null {
  const [top, bottom] = [text(`${attribute}.top`), text(`${attribute}.bottom`)]
  const [bleed, cream] = [text(`${attribute}.1.bleed`), text(`${attribute}.1.cream`)]
  if ([top, bottom, bleed, cream].every((one) => one === '')) return null
  const said = (one: string, where: string) =>
    one === hairline ? `a hairline ${where}` : `${one || '0'} mm ${where}`
  const beside = [bleed ? `bleed ${bleed}` : '', cream ? `cream layer ${cream} mm` : ''].filter(Boolean)
  return {
    typed: [said(top, 'top'), said(bottom, 'below'), ...beside].join(', '),
    detail: {
      ...layer(top, 'top'),
      ...layer(bottom, 'bottom'),
      ...(bleed ? { bleed: Number(bleed) } : {}),
      ...(cream ? { creamMm: readTyped(cream) ?? NaN } : {}),
      ...(totalMm === null ? {} : { totalMm }),
    },
  }
}
