import { describe, expect, it } from 'vitest'
import { claimedInstant } from '@/lib/reading/rules/claimed-time'
import { cycleDoubts } from '@/lib/cycle/rules/shortfall'
import {
  askedConditions,
  changedConditions,
  conditionsIn,
  conditionWords,
  methodText,
} from '@/lib/reading/rules/conditions'
import { howRead } from '@/lib/reading/rules/how-read'
import { conditionDoubts } from '@/lib/reading/rules/entry-doubts'
import { massChangePercent } from '@/lib/science/mass-change'
import { ImpossibleEntry, type TypedEntry, type ValueContext } from '@/lib/reading/rules/impossible-entry'
import { valueOf } from '@/lib/reading/rules/value'
import { readTyped } from '@/lib/reading/schema/typed'

const context: ValueContext = {
  planned: null,
  jar: { tareG: 100, grossG: 150, fillHeightMm: 62 },
  spindles: [{ name: 'T-bar C', constant: 10_000 }],
  last: null,
}
const value = (
  entry: Partial<TypedEntry> & Pick<TypedEntry, 'attribute'>,
  more: Partial<ValueContext> = {},
) => valueOf({ typed: '', detail: {}, ...entry }, { ...context, ...more })
const refused = (
  entry: Partial<TypedEntry> & Pick<TypedEntry, 'attribute'>,
  more: Partial<ValueContext> = {},
) => {
  try {
    value(entry, more)
  } catch (error) {
    if (error instanceof ImpossibleEntry) return [error.field, error.sentence]
  }
  throw new Error('It was taken.')
}

describe('what was typed', () => {
  it.each([
    ['5,60', 5.6],
    ['5.60', 5.6],
    ['1.50E4', 15_000],
    ['41 600', 41_600],
    ['41\u2009600', 41_600],
    ['\u22121,5', -1.5],
    ['.5', 0.5],
  ])('%s', (text, number) => expect(readTyped(text)).toBe(number))

  it.each(['', 'five', '1,234.5', '1.2.3', '--1', '1e', 'NaN', 'Infinity', '1e999', '0x10'])(
    '"%s" is no number',
    (text) => expect(readTyped(text)).toBeNull(),
  )
})

describe('values', () => {
  it('viscosity is torque % × constant ÷ rpm', () => {
    const detail = { torquePercent: 62, spindle: 'T-bar C', rpm: 10 }
    expect(value({ attribute: 'viscosity', typed: '62', detail }).value).toBe(62_000)
    expect(value({ attribute: 'viscosity', typed: '62,0', detail }).detail).toMatchObject({
      spindleConstant: 10_000,
    })
  })

  it('separation is the share of both layers in the fill: 4.6 and 13.1 of 62 mm are 28.5 %', () => {
    const detail = { topMm: 4.6, bottomMm: 13.1 }
    expect(value({ attribute: 'separation', typed: '4.6, 13.1', detail }).value).toBeCloseTo(28.548, 3)
  })

  it('mass is the change of the fill: 0.3 g of 50 g lost are −0.6 %', () => {
    expect(massChangePercent(150, 100, 149.7)).toBeCloseTo(-0.6)
    expect(value({ attribute: 'mass', typed: '149.7 g', detail: { grossG: 149.7 } }).value).toBeCloseTo(-0.6)
  })

  it('look is the place of its word', () => {
    expect(value({ attribute: 'look', typed: 'slightly changed' })).toMatchObject({
      value: 1,
      word: 'slightly changed',
    })
  })
})

describe('R11: the impossible', () => {
  it.each<[Partial<TypedEntry> & Pick<TypedEntry, 'attribute'>, string]>([
    [{ attribute: 'ph', typed: '14.01' }, 'typed'],
    [{ attribute: 'ph', typed: '-0.1' }, 'typed'],
    [{ attribute: 'viscosity', typed: '0' }, 'typed'],
    [
      { attribute: 'viscosity', typed: '40', detail: { torquePercent: 41, spindle: 'T-bar C', rpm: 10 } },
      'typed',
    ],
    [
      { attribute: 'viscosity', typed: '111', detail: { torquePercent: 111, spindle: 'T-bar C', rpm: 10 } },
      'typed',
    ],
    [
      { attribute: 'viscosity', typed: '40', detail: { torquePercent: 40, spindle: 'T-bar C', rpm: 0 } },
      'detail.rpm',
    ],
    [{ attribute: 'viscosity', typed: '40', detail: { torquePercent: 40, rpm: 10 } }, 'detail.spindle'],
    [{ attribute: 'separation', typed: '-', detail: {} }, 'detail.topMm'],
    [{ attribute: 'separation', typed: '-', detail: { topMm: -1 } }, 'detail.topMm'],
    [{ attribute: 'separation', typed: '-', detail: { bottomMm: 63 } }, 'detail.bottomMm'],
    [{ attribute: 'separation', typed: '-', detail: { topMm: 1, totalMm: 0 } }, 'detail.totalMm'],
    [{ attribute: 'separation', typed: '-', detail: { bleed: 5 } }, 'detail.bleed'],
    [{ attribute: 'mass', typed: '90 g', detail: { grossG: 90 } }, 'detail.grossG'],
    [{ attribute: 'mass', typed: '200 g', detail: { grossG: 200 } }, 'detail.grossG'],
    [{ attribute: 'look', typed: 'fine' }, 'typed'],
    [{ attribute: 'ph', typed: '5.5', detail: { sampleTemperatureC: 200 } }, 'detail.sampleTemperatureC'],
  ])('%j at %s', (entry, field) => expect(refused(entry)[0]).toBe(field))

  it('says when a point has slipped', () => {
    expect(refused({ attribute: 'ph', typed: '54.1' }, { last: 5.44 })[1]).toMatch(
      /The last was 5.44, so perhaps/,
    )
    expect(refused({ attribute: 'ph', typed: '72' }, { last: 5.44 })[1]).not.toMatch(/slipped/)
  })
})

describe('R06: when it was measured', () => {
  const now = '2026-12-01T12:00:00.000Z'
  it('moves the claim by the error of the device and marks what is far off', () => {
    const slow = { deviceNow: '2026-11-28T12:00:00Z', claimedAt: '2026-11-28T10:00:00Z' }
    expect(claimedInstant(slow, now)).toEqual({
      measuredAt: '2026-12-01T10:00:00.000Z',
      clock: { skewSeconds: 259_200 },
    })
  })
  it('is never later than now, and a quarter of an hour is not far', () => {
    const fast = { deviceNow: '2026-12-01T12:15:00Z', claimedAt: '2026-12-01T12:20:00Z' }
    expect(claimedInstant(fast, now)).toEqual({ measuredAt: now, clock: null })
  })
})

describe('conditions', () => {
  const initial = askedConditions(
    { spindle: 'T-bar C', rpm: 10, method: 'T-bar D, 5 rpm, 60 s, fixed' },
    {
      viscosity: { spindle: 'T-bar D', rpm: 5 },
      conditions: { spring: 'medium', seconds: 30, path: 'descending', sampleTemperatureC: 25 },
    },
  )
  it('are the initial’s own, then what the fields of the plan ask for; words of a method are not read', () => {
    expect(initial).toEqual({
      ...{ spring: 'medium', spindle: 'T-bar C', rpm: 10, seconds: 30, path: 'descending' },
      ...{ restMinutes: null, sampleTemperatureC: 25, colourBy: null },
      ...{ phMethod: null, extractParts: null, extractMinutes: null },
    })
  })
  it('are said in the order of the work, with what the method adds', () => {
    expect(conditionWords(initial)).toBe('spring medium, T-bar C, 10 rpm, after 30 s, descending, at 25 °C')
    const extract = { phMethod: 'extract', extractParts: 10, extractMinutes: 30, sampleTemperatureC: 25 }
    expect(methodText({ method: 'decanted', conditions: extract })).toBe(
      'extract 1 to 10 in water, 30 min, at 25 °C, decanted',
    )
    expect(methodText({ method: 'ruler' })).toBe('ruler')
  })
  it('of a pH are how it was brought to the electrode: methods never compare [practice]', () => {
    const asked = askedConditions(null, { conditions: { phMethod: 'extract', extractParts: 10 } })
    const doubt = (more: object) => changedConditions({ ...asked, ...more }, asked)
    expect(doubt({})).toBeNull()
    expect(doubt({ phMethod: 'direct' })).toMatch(
      /^Measured with the electrode dipped instead of an extract;/,
    )
    expect(doubt({ extractParts: 5 })).toMatch(/an extract 1 to 5 instead of 1 to 10/)
  })
  it('of a colour are whether it was measured or told from a photo [practice]', () => {
    const lab = { L: 72, a: 1, b: 15 }
    const [measured, told] = [{ lab }, { lab, isEstimate: true }]
    const doubt = (used: object, initial: object) =>
      changedConditions(conditionsIn({ ...used }), askedConditions({ ...initial }, {}))
    expect(doubt(told, measured)).toMatch(
      /^Measured with an estimate of the colour instead of a colour instr/,
    )
    expect(doubt(measured, told)).toMatch(/^Measured with a colour instrument instead of an estimate/)
    for (const same of [measured, told]) expect(doubt(same, same)).toBeNull()
    expect(doubt(told, {}), 'nothing is known of the initial').toBeNull()
  })
  it.each([
    ['separation', { topMm: 2, bottomMm: 0 }, 'with a ruler'],
    ['separation', { topMm: 2, bottomMm: 0, photoLines: {} }, 'lines on a photo'],
    ['separation', { topMm: 0, bottomMm: 0 }, null],
    ['separation', { topMm: 0.5, bottomMm: 0, isUnderRuler: true }, null],
    ['colour', { isEstimate: true, photoColour: {} }, 'colour from a photo, an estimate'],
    ['colour', { isEstimate: true }, 'an estimate'],
    ['droplets', { photoDrops: {} }, 'drops on a photo'],
    ['ph', {}, null],
  ])('of %s with %j say that it was read: %s', (attribute, detail, said) => {
    expect(howRead({ attribute, detail })).toBe(said)
  })
  const good = { code: 'V1', dueOn: '2027-01-04', result: 'good' }
  it('are no doubt where they are the initial’s', () => {
    expect(conditionDoubts({ instrument: good, ...initial }, initial, '2026-12-01')).toEqual([])
    expect(conditionDoubts({ instrument: null, ...initial, spindle: null }, initial, '2026-12-01')).toEqual(
      [],
    )
  })
  it.each([
    [{ spindle: 'T-bar D' }, /spindle T-bar D instead of the initial's T-bar C/],
    [{ rpm: 20 }, /20 rpm instead of 10/],
    [{ sampleTemperatureC: 26.5 }, /sample at 26.5 °C/],
    [{ spring: 'strong' }, /spring strong instead of medium/],
    [{ seconds: 60 }, /60 s instead of 30 s/],
    [{ path: 'fixed' as const }, /a fixed spindle instead of a descending one/],
    [{ instrument: { ...good, dueOn: '2026-11-30' } }, /V1 was due on 30 Nov 2026/],
    [{ instrument: { ...good, result: 'doubtful' } }, /last calibration of V1 was doubtful/],
    [{ instrument: { code: 'V1', dueOn: null, result: null } }, /no calibration on record/],
  ])('%j is one', (change, sentence) => {
    const doubts = conditionDoubts({ instrument: good, ...initial, ...change }, initial, '2026-12-01')
    expect(doubts).toHaveLength(1)
    expect(doubts[0]!.sentence).toMatch(sentence)
  })

  it('a half that stopped short is named by its cycle', () => {
    const place = { cycleLowC: -10, cycleHighC: 25 }
    const half = { cycle: 4, half: 'cold', reachedC: -6, isFrozenThrough: null, hours: 16 }
    expect(cycleDoubts(place, [half])[0]!.sentence).toMatch(/^Cycle 4 fell short/)
    expect(cycleDoubts(place, [{ ...half, reachedC: -9 }])).toEqual([])
    expect(cycleDoubts(place, [{ ...half, half: 'warm', reachedC: 21 }])).toHaveLength(1)
  })
})
