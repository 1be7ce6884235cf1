import { weaknesses } from '@/lib/shelf-case/rules/weakness'
import type { TemperatureRecord } from '@/lib/shelf-case/rules/content'
import { describe, expect, it } from 'vitest'
import { AppError } from '@/lib/http/errors'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'
import { monthsOf, nominalMonths } from '@/lib/science/months'
import { assertProposal, assertState, whyNotSign } from '@/lib/shelf-case/rules/refusals'
import { caseProposal } from '@/lib/shelf-case/schema'

describe('canonical JSON', () => {
  // RFC 8785, section 3.2.2 and 3.2.3: the sample object and its canonical form.
  it('writes the sample of RFC 8785 as the RFC does', () => {
    const sample = {
      numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: '\u20ac$\u000F\u000aA\'\u0042\u0022\u005c\\"\u002f',
      literals: [null, true, false],
    }
    expect(canonicalJson(sample)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"\u20ac$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    )
  })

  // RFC 8785, section 3.2.3: property names sort by UTF-16 code units.
  it('sorts members by UTF-16 code units', () => {
    const sample = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    }
    const order = Object.values(JSON.parse(canonicalJson(sample)) as Record<string, string>)
    // "1" is an integer key and comes first in any object; the rest as listed by the RFC.
    expect(canonicalJson(sample).indexOf('Carriage')).toBeLessThan(canonicalJson(sample).indexOf('One'))
    expect(order).toHaveLength(7)
    const text = canonicalJson(sample)
    const at = ['Carriage', '"One"', 'Control', 'Latin', 'Euro', 'Emoji', 'Hebrew'].map((w) =>
      text.indexOf(w),
    )
    expect(at).toEqual([...at].sort((a, b) => a - b))
  })

  it('refuses what JSON cannot hold instead of dropping it', () => {
    expect(() => canonicalJson({ a: Number.NaN })).toThrow(/not finite/)
    expect(() => canonicalJson({ a: undefined })).toThrow(/undefined/)
  })
})

describe('months of a pull', () => {
  it('counts weeks as months of 365.25 / 12 days', () => {
    expect(monthsOf(365.25 / 7)).toBeCloseTo(12, 12)
  })

  it('takes a pull a few days early for the month it stands for, and no other', () => {
    // 104 weeks are 23.92 months: the pull of month 24, made in its window.
    expect(nominalMonths(104)).toBe(24)
    expect(nominalMonths(12)).toBeCloseTo(2.76, 2)
  })
})

const proposal = (change: object) =>
  caseProposal.parse({ kind: 'real time', proposedMonths: 24, storageStatement: 'closed', ...change })

describe('a proposal', () => {
  it('is never more than the evidence supports', () => {
    expect(() => assertProposal(proposal({ proposedMonths: 25 }), 24)).toThrow(/supports 24 months/)
    expect(() => assertProposal(proposal({}), 24)).not.toThrow()
  })

  it('of fewer months says why', () => {
    expect(() => assertProposal(proposal({ proposedMonths: 18 }), 24)).toThrow(/Say why/)
    expect(() => assertProposal(proposal({ proposedMonths: 18, whyFewer: 'small kettle' }), 24)).not.toThrow()
  })

  it('that is provisional rests on a written rule and a review day', () => {
    expect(() => assertProposal(proposal({ kind: 'provisional' }), 0)).toThrow(AppError)
    const whole = { kind: 'provisional', provisionalRule: 'twelve weeks at 40 °C', reviewOn: '2027-03-01' }
    expect(() => assertProposal(proposal(whole), 0)).not.toThrow()
  })

  it('of a period after opening names its evidence', () => {
    expect(() => assertProposal(proposal({ periodAfterOpeningMonths: 12 }), 24)).toThrow(/evidence/)
  })
})

describe('who signs, and when', () => {
  const did = { putForwardById: 'liv', createdById: 'liv', readingAuthors: ['mada'] }
  it('S04: nobody who put it forward or logged a reading', () => {
    expect(whyNotSign('liv', did)).toMatch(/put this case forward/)
    expect(whyNotSign('mada', did)).toMatch(/logged or voided/)
    expect(whyNotSign('rune', did)).toBeNull()
  })

  it('R10: nothing but a case that was put forward', () => {
    for (const state of ['drafting', 'sent back', 'signed', 'superseded'] as const)
      expect(() => assertState('C-001', state, 'put forward', 'signed')).toThrow(/cannot be signed/)
  })
})

it('tells every amendment of the study among what weakens a case, with its reason and who made it', () => {
  const found = weaknesses({
    batches: [{}, {}, {}],
    flags: [],
    amendments: [
      {
        number: 1,
        kind: 'station end',
        sentence: '40 °C ended early, in week 16.',
        reason: 'The oven failed.',
        madeAt: '2026-11-17T09:00:00.000Z',
        madeBy: 'LB',
      },
    ],
    moves: [],
    stations: [],
    station: { name: 'room cabinet' },
    attributes: [],
    record: {} as TemperatureRecord,
    missing: [],
    dataMonths: 6,
  })
  expect(found).toEqual([
    {
      state: 'answered',
      title: 'Amendment 1 while the study ran',
      text: '40 °C ended early, in week 16. The oven failed.',
      by: 'LB, 17 Nov 2026',
    },
  ])
})
