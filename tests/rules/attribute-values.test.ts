import { describe, expect, it } from 'vitest'
import { ImpossibleEntry, type ValueContext } from '@/lib/reading/rules/impossible-entry'
import { valueOf } from '@/lib/reading/rules/value'
import { attributeName, attributeOf, type AttributeKey } from '@/lib/reading/schema/attributes'
import { isOwn, ownKeyOf } from '@/lib/reading/schema/own-key'
import type { EntryDetail } from '@/lib/reading/schema/entry'
import { plannedAttribute } from '@/lib/protocol/schema'
import { shownValue, shownWithUnit } from '@/lib/study/rules/words'
import { inSentence } from '@/lib/study/rules/finding'

function read(
  attribute: AttributeKey,
  typed: string,
  context: Partial<ValueContext> = {},
  detail: EntryDetail = {},
) {
  const jar = { tareG: null, grossG: null, fillHeightMm: 40 }
  return valueOf({ attribute, typed, detail }, { planned: null, jar, spindles: [], last: null, ...context })
}

function refusal(act: () => unknown): string {
  try {
    act()
  } catch (error) {
    if (error instanceof ImpossibleEntry) return `${error.field}: ${error.sentence}`
    throw error
  }
  return 'taken'
}

describe('colour', () => {
  // Sharma, Wu and Dalal 2005, table 1, pairs 1 and 17.
  it.each([
    ['50 2.6772 -79.7751', '50 0 -82.7485', 2.0425],
    ['50 2.5 0', '50 0 -2.5', 4.3065],
  ])('is the published CIEDE2000 from the initial %s to %s', (initial, sample, expected) => {
    const reference = read('colour', initial, { initial: 'self' })
    expect(reference.value).toBe(0)
    expect(read('colour', sample, { initial: reference.detail }).value).toBeCloseTo(expected, 4)
  })

  it('reads decimal commas, and refuses what is no colour or has nothing to be told from', () => {
    expect(read('colour', '72,4 1,2 14,8', { initial: 'self' }).detail).toMatchObject({
      lab: { L: 72.4, a: 1.2, b: 14.8 },
    })
    expect(refusal(() => read('colour', '72.4 1.2'))).toContain('three numbers')
    expect(refusal(() => read('colour', '172 1 1', { initial: 'self' }))).toContain('0, black, to 100')
    expect(refusal(() => read('colour', '72 1 14'))).toContain('not read at the start')
  })
})

describe('emulsion type', () => {
  it('is a value only where it changed, against the initial or else the batch', () => {
    const initial = read('type', 'oil outside', { initial: 'self' }).detail
    expect(read('type', 'oil outside', { initial }).value).toBe(0)
    expect(read('type', 'not clear', { initial }).value).toBe(1)
    expect(read('type', 'water outside', { initial })).toMatchObject({ value: 2, word: 'water outside' })
    expect(read('type', 'water outside', { emulsionType: 'oil-in-water' }).value).toBe(0)
    expect(read('type', 'water outside', { emulsionType: 'water-in-silicone' }).value).toBe(2)
    expect(refusal(() => read('type', 'green', { initial }))).toContain('Choose one')
    expect(refusal(() => read('type', 'not clear', { initial: 'self' }))).toContain('Test again')
  })
})

describe('centrifuge', () => {
  const planned = { centrifuge: { rpm: 3000, radiusMm: 100, minutes: 30 } }

  // RCF = 1.118e-5 · r(cm) · rpm²: 3000 rpm at 10 cm is 1 006 g, as rotor tables print it.
  it('tells the force of the rotor, and none, a trace and a layer apart', () => {
    expect(read('centrifuge', 'none', { planned })).toMatchObject({ value: 0, word: 'none' })
    expect(read('centrifuge', 'none', { planned }).detail['rcf']).toBeCloseTo(1006.2, 1)
    const trace = read('centrifuge', 'trace', { planned }).value
    expect(trace).toBeGreaterThan(0)
    expect(read('centrifuge', '1,5', { planned }).value).toBe(1.5)
    expect(trace).toBeLessThan(read('centrifuge', '0.5', { planned }).value)
    expect(read('centrifuge', '2', { planned }, { rpm: 6000 }).detail['rcf']).toBeCloseTo(4024.8, 1)
    expect(refusal(() => read('centrifuge', 'none'))).toContain('detail.rpm')
    expect(refusal(() => read('centrifuge', 'some', { planned }))).toContain('none, a trace, or a layer')
  })
})

describe('droplets', () => {
  // Moment means by hand: Σd³/Σd² of 1 × 1 and 1 × 2 is 9/5; Σd⁴/Σd³ is 17/9.
  it('is the diameter that the protocol names', () => {
    expect(read('droplets', '1; 2', { planned: { dropletMeasure: 'd32' } }).value).toBeCloseTo(1.8, 10)
    expect(read('droplets', '1; 2', { planned: { dropletMeasure: 'd43' } }).value).toBeCloseTo(17 / 9, 10)
    expect(read('droplets', '1 2', { planned: { dropletMeasure: 'd10' } }).value).toBeCloseTo(1.5, 10)
    expect(read('droplets', '3 × 5').detail).toMatchObject({ measure: 'd50v', count: 5 })
    expect(refusal(() => read('droplets', 'many'))).toContain('no diameter')
  })

  // By hand: 300 px for 50 micrometres, so 30 px and 60 px are 5 and 10; Σd³/Σd² of 5 and 10 is 1125/125.
  it('on a photo is computed from points and scale bar, and typed otherwise is refused', () => {
    const photoDrops = {
      ...{ photoId: '00000000-0000-7000-8000-000000000009', width: 800, height: 600 },
      bar: { x1: 10, y1: 10, x2: 310, y2: 10, um: 50 },
      drops: [
        { x1: 100, y1: 100, x2: 130, y2: 100 },
        { x1: 200, y1: 200, x2: 236, y2: 248 },
      ],
    }
    const planned = { planned: { dropletMeasure: 'd32' as const } }
    expect(read('droplets', '5; 10', planned, { photoDrops }).value).toBeCloseTo(9, 10)
    for (const typed of ['5; 11', '5', '5; 10; 10', '5 × 2'])
      expect(refusal(() => read('droplets', typed, planned, { photoDrops }))).toContain('do not say the same')
    const short = { ...photoDrops, bar: { ...photoDrops.bar, x2: 15 } }
    expect(refusal(() => read('droplets', '5; 10', planned, { photoDrops: short }))).toContain('too short')
  })
})

describe('separation', () => {
  it('keeps a hairline apart from none, and a cream layer apart from both', () => {
    const planned = { rulerMm: 0.5 }
    const hairline = read('separation', 'x', { planned }, { isTopHairline: true, bottomMm: 0 })
    expect(hairline.value).toBeGreaterThan(0)
    expect(hairline.detail).toMatchObject({ isUnderRuler: true, rulerMm: 0.5 })
    const layer = read('separation', 'x', { planned }, { topMm: 0, bottomMm: 0.5 })
    expect(layer.value).toBe(1.25)
    expect(layer.detail).not.toHaveProperty('isUnderRuler')
    expect(read('separation', 'x', {}, { topMm: 0, bottomMm: 0 }).detail).not.toHaveProperty('isUnderRuler')
    // The sum counts: two layers thinner than the ruler's millimetre may be more than 1 mm of 40 together.
    const both = read('separation', 'x', {}, { topMm: 0.3, bottomMm: 0.8 })
    expect(both.value).toBeCloseTo(2.75, 10)
    expect(both.detail).not.toHaveProperty('isUnderRuler')
    expect(read('separation', 'x', {}, { topMm: 0.2, bottomMm: 0.6 }).detail).toHaveProperty('isUnderRuler')
    const hairlines = read('separation', 'x', {}, { isTopHairline: true, isBottomHairline: true })
    expect(hairlines.detail).toHaveProperty('isUnderRuler')
    const cream = read('separation', 'x', {}, { topMm: 0, bottomMm: 2, creamMm: 10 })
    expect(cream).toMatchObject({ value: 5, detail: { creamPercent: 25 } })
    expect(refusal(() => read('separation', 'x', {}, { topMm: 0, bottomMm: 35, creamMm: 10 }))).toContain(
      'detail.creamMm',
    )
  })
})

describe("an attribute of the protocol's own", () => {
  const foam = plannedAttribute.parse({
    attribute: 'own.Foam-height',
    own: {
      ...{ kind: 'number', unit: 'mm', decimals: 0, lower: 0, upper: 300, scatter: 3 },
      ...{ isGradual: true, jar: 'measuring' },
    },
    tolerance: { kind: 'percent', below: 20 },
    replicates: 2,
    method: 'shaken ten times in a cylinder',
  })
  const grit = plannedAttribute.parse({
    attribute: 'own.Grittiness',
    own: { kind: 'scale', words: ['smooth', 'a few grains', 'gritty'], jar: 'watch' },
    tolerance: { kind: 'range', upper: 1 },
    replicates: 1,
    method: '',
  })

  it('is known by its name alone, and by its plan in unit, figures and words', () => {
    expect(ownKeyOf('  Foam  height ')).toBe('own.Foam-height')
    expect(ownKeyOf('Foam / height')).toBeNull()
    expect(isOwn('ph')).toBe(false)
    expect(attributeName('own.Foam-height')).toBe('Foam height')
    expect(inSentence('own.Foam-height')).toBe('foam height')
    expect(shownWithUnit(attributeOf(foam.attribute, foam), 41.6)).toBe('42 mm')
    expect(shownValue(attributeOf(grit.attribute, { attributes: [foam, grit] }), 1)).toBe('a few grains')
    expect(attributeOf(foam.attribute, foam)).toMatchObject({ isGradual: true, jar: 'measuring' })
  })

  it('is read within what is possible, a scale by its own words', () => {
    expect(read(foam.attribute, '41,5', { planned: foam }).value).toBe(41.5)
    expect(refusal(() => read(foam.attribute, '301', { planned: foam }))).toContain('runs from 0 to 300 mm')
    expect(read(grit.attribute, 'gritty', { planned: grit })).toMatchObject({ value: 2, word: 'gritty' })
    expect(refusal(() => read(grit.attribute, 'coarse', { planned: grit }))).toContain(
      'smooth, a few grains, gritty',
    )
  })

  it('says what it is, and nothing known says it anew', () => {
    const { own: _, ...bare } = foam
    expect(plannedAttribute.safeParse(bare).success).toBe(false)
    expect(plannedAttribute.safeParse({ ...foam, attribute: 'ph' }).success).toBe(false)
    expect(plannedAttribute.safeParse({ ...foam, attribute: 'own.' }).success).toBe(false)
    expect(
      plannedAttribute.safeParse({ ...grit, own: { ...grit.own, words: ['smooth', 'Smooth'] } }).success,
    ).toBe(false)
  })
})
