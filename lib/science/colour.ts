import { differenceCiede2000 } from 'culori/fn'
import { assertComputable, assertFinite } from './guard'

export type Lab = { L: number; a: number; b: number }

const ciede2000 = differenceCiede2000()

/** Colour difference of two CIELAB colours: CIEDE2000 (kL = kC = kH = 1) and ΔE*ab of 1976. */
export function colour({ reference, sample }: { reference: Lab; sample: Lab }): {
  deltaE00: number
  deltaE76: number
} {
  for (const [field, lab] of [['reference', reference] as const, ['sample', sample] as const]) {
    assertFinite(`${field}.L`, lab.L)
    assertFinite(`${field}.a`, lab.a)
    assertFinite(`${field}.b`, lab.b)
  }
  return assertComputable('sample', {
    deltaE00: ciede2000(asCulori(reference), asCulori(sample)),
    deltaE76: Math.hypot(sample.L - reference.L, sample.a - reference.a, sample.b - reference.b),
  })
}

/** `lab65` is the space in which culori takes the difference: no conversion touches the numbers. */
function asCulori({ L, a, b }: Lab) {
  return { mode: 'lab65' as const, l: L, a, b }
}
