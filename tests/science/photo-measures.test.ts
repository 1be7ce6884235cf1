import { convertLab65ToRgb, convertLrgbToRgb, convertRgbToLrgb } from 'culori/fn'
import { describe, expect, it } from 'vitest'
import { colour } from '@/lib/science/colour'
import { ScienceError } from '@/lib/science/guard'
import { patchOf, type Linear, type Patch } from '@/lib/science/patch'
import { colourByGrey, greyCardL } from '@/lib/science/photo-colour'
import { diametersOnPhoto } from '@/lib/science/photo-drops'

type Rgb = [number, number, number]
/** Left half one colour, right half another, stored as a camera would: eight bits of sRGB. */
function halves(left: Rgb, right: Rgb, [width, height] = [80, 40]) {
  const data = new Uint8Array(width! * height! * 4)
  for (let at = 0; at < width! * height!; at += 1)
    data.set([...(at % width! < width! / 2 ? left : right), 255], at * 4)
  return { width: width!, height: height!, data }
}
const greyAt = { x: 20, y: 20, side: 20 }
const sampleAt = { x: 60, y: 20, side: 20 }

/** A card of L* 49.5 and a sample, under a lamp that colours and dims each channel, as a camera of sRGB stores them. */
function photographed(lab: { L: number; a: number; b: number }, lamp: Linear) {
  const stored = (l: number, a: number, b: number): Rgb => {
    const light = convertRgbToLrgb(convertLab65ToRgb({ l, a, b }))
    const seen = convertLrgbToRgb({ r: light.r * lamp[0], g: light.g * lamp[1], b: light.b * lamp[2] })
    return [seen.r, seen.g, seen.b].map((v) => Math.round(v * 255)) as Rgb
  }
  return halves(stored(greyCardL, 0, 0), stored(lab.L, lab.a, lab.b))
}
const told = (picture: ReturnType<typeof halves>, greyL = greyCardL) =>
  colourByGrey({ grey: patchOf(picture, greyAt), sample: patchOf(picture, sampleAt), greyL })

describe('a colour beside a grey card', () => {
  it('18 % reflectance has L* 49.5, and sRGB primaries the L*a*b* published for them (IEC 61966-2-1, CIE 15)', () => {
    expect(116 * Math.cbrt(0.18) - 16).toBeCloseTo(greyCardL, 1)
    // The grey of 18 % is stored as 118 [IEC 61966-2-1: 255 × (1.055 × 0.18^(1/2.4) − 0.055) = 117.6].
    const red = told(halves([118, 118, 118], [253, 0, 0]))
    // sRGB red is L* 53.24, a* 80.09, b* 67.20 under D65 [Lindbloom's calculator, memory]; 253 of 255 is a shade below.
    expect(Math.abs(red.lab.L - 53.24)).toBeLessThan(0.7)
    expect(Math.abs(red.lab.a - 80.09)).toBeLessThan(0.9)
    expect(Math.abs(red.lab.b - 67.2)).toBeLessThan(0.9)
  })

  // In dim light eight bits tell the card's grey less finely.
  it.each<[string, Linear, number]>([
    ['plain light', [1, 1, 1], 1],
    ['a warm lamp', [0.95, 0.7, 0.45], 1],
    ['half the light', [0.5, 0.5, 0.5], 1],
    ['cold, dim light', [0.35, 0.45, 0.6], 1.5],
  ])('is told in %s as well, within units of CIEDE2000', (_name, lamp, within) => {
    for (const lab of [
      { L: 88, a: 1, b: 9 },
      { L: 72, a: -2, b: 14 },
      { L: 60, a: 8, b: 25 },
    ])
      expect(colour({ reference: lab, sample: told(photographed(lab, lamp)).lab }).deltaE00).toBeLessThan(
        within,
      )
  })

  it('without the card’s correction the same photo would be off by many units', () => {
    const lab = { L: 72, a: -2, b: 14 }
    const picture = photographed(lab, [0.95, 0.7, 0.45])
    const neutral: Patch = { ...patchOf(picture, greyAt), mean: [0.18, 0.18, 0.18] }
    const raw = colourByGrey({ grey: neutral, sample: patchOf(picture, sampleAt), greyL: greyCardL })
    expect(colour({ reference: lab, sample: raw.lab }).deltaE00).toBeGreaterThan(8)
  })

  it.each<[string, () => unknown, RegExp]>([
    ['a burnt sample', () => told(halves([118, 118, 118], [255, 255, 240])), /sample is burnt out/],
    ['a black card', () => told(halves([0, 0, 0], [90, 90, 90])), /card is burnt out or black/],
    ['a card in the dark', () => told(halves([12, 12, 12], [90, 90, 90])), /lies in the dark/],
    ['a card that is none', () => told(halves([200, 60, 20], [90, 90, 90])), /is no grey/],
    ['a sample above white', () => told(halves([60, 60, 60], [250, 250, 250])), /brighter than white/],
    ['an L* that no card has', () => told(halves([118, 118, 118], [90, 90, 90]), 3), /L\* of 10 to 98/],
  ])('%s is refused by a sentence', (_name, tell, sentence) => {
    expect(tell).toThrow(ScienceError)
    expect(tell).toThrow(sentence)
  })

  it('a card lit from one side is refused, one slightly uneven is not sure', () => {
    const shaded = (by: number) => {
      const picture = halves([118, 118, 118], [180, 170, 150])
      for (let y = 20; y < 40; y += 1)
        for (let x = 0; x < 40; x += 1) picture.data.fill(118 - by, (y * 80 + x) * 4, (y * 80 + x) * 4 + 3)
      return picture
    }
    expect(told(shaded(0)).reasons).toEqual([])
    expect(told(shaded(9)).reasons).toEqual(['The light on the grey card is not quite even.'])
    expect(() => told(shaded(30))).toThrow(/not even/)
  })

  it('a noisy sample is not sure; a patch beside the picture is none', () => {
    const picture = halves([118, 118, 118], [150, 150, 150])
    for (let at = 0; at < picture.data.length; at += 8)
      if (at % 320 >= 160) picture.data.set([185, 185, 185], at)
    expect(told(picture).reasons).toEqual(['The sample’s patch is noisy or holds gloss or edges.'])
    expect(() => patchOf(picture, { x: 2, y: 2, side: 20 })).toThrow(ScienceError)
  })
})

describe('drops on a photo', () => {
  it('a scale bar of 300 px for 50 micrometres makes 6 px a micrometre, in any direction', () => {
    const bar = { x1: 100, y1: 900, x2: 400, y2: 900, um: 50 }
    const drops = [
      { x1: 10, y1: 10, x2: 40, y2: 10 },
      { x1: 100, y1: 100, x2: 118, y2: 124 },
    ]
    expect(diametersOnPhoto(bar, drops)).toEqual([5, 5])
    expect(() => diametersOnPhoto({ ...bar, x2: 110 }, drops)).toThrow(ScienceError)
    expect(() => diametersOnPhoto({ ...bar, um: 0 }, drops)).toThrow(ScienceError)
  })
})
