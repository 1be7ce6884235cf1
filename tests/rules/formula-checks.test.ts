import { describe, expect, it } from 'vitest'
import { formulaChecks } from '@/lib/formula/rules/checks'
import { noGround, type CheckKey, type CheckLine, type Ground } from '@/lib/formula/rules/checks/check'
import type { TargetPh } from '@/lib/formula/rules/target-ph'
import type { EmulsionType } from '@/lib/formula/schema'
import type { IngredientFacts } from '@/lib/ingredient/queries'
import { neutralisedPercent } from '@/lib/science/neutralisation'

const line = (
  inciName: string,
  fn: string,
  percent: number,
  isInternal: boolean,
  more: object = {},
): CheckLine => ({
  ...{ id: inciName, phase: isInternal ? 'B' : 'A', ingredientId: inciName, inciName, function: fn },
  ...{ percentThousandths: Math.round(percent * 1000), density: 1, isInternal, isRemainder: false },
  ...more,
})
const step = (phase: string, more: object = {}) => ({
  ...{ phase, instruction: 'Stir', speedRpm: null, minutes: null, temperatureC: null },
  ...more,
})
const facts = (more: Partial<IngredientFacts>): IngredientFacts => ({
  ...{
    id: '',
    density: 1,
    densitySource: 'from memory',
    rangeSource: 'from memory',
    figuresSource: 'from memory',
  },
  ...{ percentLowThousandths: null, percentHighThousandths: null, acidValue: null, baseValue: null },
  ...{ phLow: null, phHigh: null, meltsAboveC: null, holdsInternalPercent: null },
  ...more,
})
const ground = (more: Partial<Ground>): Ground => ({ ...noGround, ...more })

const oil = line('Squalane', 'oil', 10, false)
const polymer = line('PEG-30 Dipolyhydroxystearate', 'polymeric emulsifier', 2.4, false)
const thick = line('Disteardimonium Hectorite', 'thickens the oil', 0.5, false)
const water = line('Aqua', 'water', 84, true, { isRemainder: true })
const salt = line('Magnesium Sulfate', 'electrolyte', 1, true)
const gum = line('Xanthan Gum', 'gels the water', 0.25, true)
const keeps = line('Phenoxyethanol', 'preservative', 0.8, true)
const cream = [oil, polymer, thick, water, salt, gum, keeps]
const joined = [step('A'), step('B into A', { speedRpm: 300, minutes: 44, temperatureC: 28 })]
const holding = ground({ facts: { [polymer.id]: facts({ holdsInternalPercent: 90 }) } })

const ask = (
  lines: CheckLine[],
  steps: ReturnType<typeof step>[],
  on: Ground = noGround,
  type: EmulsionType = 'water-in-oil',
  target: TargetPh | null = null,
) => formulaChecks(type, lines, steps, on, target)
const one = (checks: ReturnType<typeof formulaChecks>, key: CheckKey) =>
  checks.find((check) => check.key === key)
const open = (checks: ReturnType<typeof formulaChecks>) =>
  checks.filter((check) => check.isOpen).map((check) => check.key)

describe('questions to a formula', () => {
  it('are answered by its own lines and steps, each with a reason and where that is from', () => {
    const checks = ask(cream, joined, holding)
    expect(open(checks)).toEqual([])
    expect(one(checks, 'slow')?.answer).toBe('Yes, over 44 min in step 2.')
    expect(checks.every((check) => check.reason.length > 10 && check.mark.length > 3)).toBe(true)
    expect(one(checks, 'salt')?.lines).toEqual([{ id: salt.id, name: 'Magnesium Sulfate' }])
  })

  it('stay open where nothing holds the film and no step says how', () => {
    expect(open(ask([], []))).toEqual(['polymer', 'gel', 'slow', 'shear', 'cold', 'thick', 'salt'])
    expect(open(ask([oil, water], joined))).toEqual(['polymer', 'gel', 'thick', 'salt', 'preservative'])
  })

  it('of an oil-in-water formula leave the film of the oil alone', () => {
    const lotion = cream.map((one) => ({ ...one, isInternal: !one.isInternal }))
    const keys = ask(lotion, joined, noGround, 'oil-in-water').map((check) => check.key)
    expect(keys).toEqual(['shear', 'agree', 'preservative'])
  })
})

describe('what the emulsifier holds', () => {
  it('is asked where drops are packed and the book knows nothing, or less', () => {
    expect(one(ask(cream, joined), 'holds')?.answer).toContain('the book does not say what PEG-30')
    const little = ground({
      facts: { [polymer.id]: facts({ holdsInternalPercent: 80, figuresSource: 'sheet 4' }) },
    })
    const check = one(ask(cream, joined, little), 'holds')
    expect([check?.isOpen, check?.mark]).toEqual([true, 'sheet 4'])
    expect(check?.answer).toContain('is known to hold 80 %')
    expect(one(ask(cream, joined, holding), 'holds')?.isOpen).toBe(false)
  })

  it('is not asked where drops have room', () => {
    expect(
      one(
        ask(
          [{ ...oil, percentThousandths: 60_000 }, polymer, { ...water, percentThousandths: 37_600 }],
          joined,
        ),
        'holds',
      ),
    ).toBeUndefined()
  })
})

describe('salt and gelling polymer', () => {
  it('asks about an acrylic thickener and about calcium with gums that set', () => {
    const clash = ask([...cream, line('Carbomer', 'gels the water', 0.3, true)], joined)
    expect(one(clash, 'agree')).toMatchObject({
      isOpen: true,
      answer: 'Open: Carbomer thins where Magnesium Sulfate is.',
    })
    const lime = [
      oil,
      line('Calcium Chloride', 'electrolyte', 1, true),
      line('Algin', 'gels the water', 1, true),
    ]
    expect(one(ask(lime, joined), 'agree')?.isOpen).toBe(true)
    expect(one(ask(cream, joined), 'agree')?.isOpen).toBe(false)
    expect(one(ask([oil, water, salt], joined), 'agree')).toBeUndefined()
  })
})

describe('neutraliser', () => {
  const carbomer = line('Carbomer', 'gels the water', 0.15, true)
  const lye = line('Sodium Hydroxide', 'neutraliser', 0.06, true)
  const values = ground({
    facts: { Carbomer: facts({ acidValue: 780 }), 'Sodium Hydroxide': facts({ baseValue: 1403 }) },
  })
  const check = (lines: CheckLine[], on = values) => one(ask(lines, [], on), 'neutral')

  it('is missing, fits, is too much or too little', () => {
    expect(check([carbomer])?.answer).toBe('Open: nothing neutralises Carbomer.')
    // 0.06 · 1403 / (0.15 · 780) = 0.7195
    expect(check([carbomer, lye])).toMatchObject({
      isOpen: false,
      answer: 'Yes, Sodium Hydroxide takes up 72 % of the acid of Carbomer.',
    })
    expect(check([carbomer, { ...lye, percentThousandths: 120 }])?.answer).toContain('too much')
    expect(check([carbomer, { ...lye, percentThousandths: 20 }])?.answer).toContain('little')
    expect(check([lye])?.answer).toContain('nothing here is an acid')
  })

  it('is open where the book lacks a value, and not asked of a polymer sold as its salt', () => {
    expect(check([carbomer, lye], noGround)?.answer).toBe('Open: the book has no acid value of Carbomer.')
    expect(check([line('Sodium Carbomer', 'gels the water', 0.3, true)])).toBeUndefined()
  })

  it('computes as by hand, and refuses what cannot be', () => {
    // Potassium hydroxide itself has 1000 mg KOH per g.
    expect(
      neutralisedPercent({ acids: [{ percent: 2, value: 500 }], bases: [{ percent: 1, value: 1000 }] }),
    ).toBe(100)
    expect(() => neutralisedPercent({ acids: [], bases: [] })).toThrow(/at least one/)
    expect(() => neutralisedPercent({ acids: [{ percent: 0, value: 500 }], bases: [] })).toThrow()
  })
})

describe('what batches have borne', () => {
  const batch = (rpm: number, minutes: number, more: object[] = []) => ({
    ...{ code: 'N1-1', addedPercent: 86 },
    steps: [
      step('A'),
      step('B into A', { speedRpm: rpm, minutes, temperatureC: 28 }),
      ...more,
    ] as typeof joined,
  })
  const after = (rpm: number, minutes: number, more: object[] = []) =>
    ground({ ...holding, borne: [batch(rpm, minutes, more)] })

  it('asks when it goes in faster than any of them', () => {
    expect(one(ask(cream, joined, after(300, 44)), 'slow')).toMatchObject({
      isOpen: false,
      answer: 'Yes, over 44 min in step 2; N1-1 bore it.',
    })
    expect(one(ask(cream, joined, after(300, 80)), 'slow')?.answer).toBe(
      'Open: 2.0 % of the batch a minute in step 2; the fastest borne is 1.1 % of the batch a minute, in N1-1.',
    )
    expect(one(ask(cream, [step('B into A')]), 'slow')?.answer).toBe('Open: step 1 has no minutes.')
  })

  it('asks when it is stirred faster, and takes what was borne for an answer', () => {
    const fast = [step('B into A', { speedRpm: 1500, minutes: 44, temperatureC: 28 })]
    expect(one(ask(cream, fast), 'shear')?.answer).toBe('Open: 1500 rpm in step 1; has a batch borne it?')
    expect(one(ask(cream, fast, after(1500, 44)), 'shear')?.isOpen).toBe(false)
    expect(one(ask(cream, fast, after(300, 44)), 'shear')).toMatchObject({ isOpen: true, mark: 'batch N1-1' })
  })

  it('asks about homogenising at the end, unless a batch bore that', () => {
    const finished = [...joined, step('', { instruction: 'Homogenise', speedRpm: 8000 })]
    expect(one(ask(cream, joined), 'finish')).toBeUndefined()
    expect(one(ask(cream, finished), 'finish')?.answer).toContain('no batch has borne it')
    const borne = after(300, 44, [step('', { instruction: 'Homogenise', speedRpm: 8000 })])
    expect(one(ask(cream, finished, borne), 'finish')?.isOpen).toBe(false)
    expect(one(ask(cream, finished), 'shear')?.isOpen).toBe(false)
  })

  it('asks when it is warm', () => {
    const warm = [step('B into A', { speedRpm: 300, minutes: 44, temperatureC: 60 })]
    expect(one(ask(cream, warm), 'cold')?.isOpen).toBe(true)
    const borne = ground({ borne: [{ code: 'N1-1', addedPercent: 86, steps: warm }] })
    expect(one(ask(cream, warm, borne), 'cold')?.isOpen).toBe(false)
  })
})

describe('preservative', () => {
  const benzoate = line('Sodium Benzoate', 'preservative', 0.4, true)
  const range = { 'Sodium Benzoate': facts({ phLow: 2, phHigh: 5 }) }
  const ph = (target: TargetPh | null) =>
    one(ask([oil, water, benzoate], [], ground({ facts: range }), 'water-in-oil', target), 'ph')

  it('is missing, and a booster is none', () => {
    const booster = line('Ethylhexylglycerin', 'preservative booster', 0.1, true)
    expect(one(ask([oil, water, booster], []), 'preservative')?.isOpen).toBe(true)
    expect(one(ask([oil, water, benzoate], []), 'preservative')?.isOpen).toBe(false)
    expect(one(ask([oil], []), 'preservative')).toBeUndefined()
  })

  it('works at the target pH of the formula or not; without one the question is open', () => {
    expect(ph(null)).toMatchObject({ isOpen: true })
    expect(ph({ low: 4.5, high: 4.5 })).toMatchObject({ isOpen: false })
    expect(ph({ low: 6, high: 6 })).toMatchObject({ isOpen: true })
    expect(ph({ low: 6, high: 6 })?.answer).toContain('target 6.00;')
    // Of a range both ends have to be borne.
    expect(ph({ low: 4, high: 5 })?.isOpen).toBe(false)
    expect(ph({ low: 4.8, high: 5.2 })).toMatchObject({ isOpen: true })
    expect(ph({ low: 4.8, high: 5.2 })?.answer).toContain('target 4.80 to 5.20')
    expect(ph({ low: 4.8, high: 5.2 })?.askedAbout).not.toBe(ph({ low: 4.8, high: 5 })?.askedAbout)
    expect(one(ask(cream, joined), 'ph')).toBeUndefined()
  })
})

describe('what the book says', () => {
  it('asks about what must be melted in a phase that stays cold', () => {
    const wax = line('Beeswax', 'thickens the oil', 1, false)
    const on = ground({ facts: { Beeswax: facts({ meltsAboveC: 63 }) } })
    expect(one(ask([...cream, wax], joined, on), 'melt')?.answer).toBe(
      'Open: Beeswax melts above 63 °C, and phase A gets 28 °C.',
    )
    expect(one(ask([wax], [], on), 'melt')?.answer).toContain('no step says how warm phase A gets')
    const hot = [step('A', { temperatureC: 75 }), ...joined]
    expect(one(ask([wax], hot, on), 'melt')).toBeUndefined()
    // The other phase is warm, this one is not.
    expect(one(ask([wax], [step('B', { temperatureC: 75 })], on), 'melt')).toBeDefined()
  })

  it('asks about shares outside the usual, and leaves the q.s. line alone', () => {
    const on = ground({
      facts: { Phenoxyethanol: facts({ percentLowThousandths: 400, percentHighThousandths: 1000 }) },
    })
    const at = (percent: number, more: object = {}) =>
      one(ask([{ ...keeps, percentThousandths: percent * 1000, ...more }], [], on), 'range')
    expect(at(1.2)?.answer).toBe('Open: Phenoxyethanol at 1.20 %, usual at most 1.00 %.')
    expect(at(0.2)?.answer).toContain('usual at least 0.40 %')
    expect(at(1)).toBeUndefined()
    expect(at(1.2, { isRemainder: true })).toBeUndefined()
  })

  it('asks about a density that is missing, off the book or absurd', () => {
    const on = ground({ facts: { Squalane: facts({ density: 0.81 }) } })
    const at = (density: number | null, g = on) => one(ask([{ ...oil, density }], [], g), 'density')
    expect(at(null)?.answer).toBe('Open: Squalane has none.')
    expect(at(8.1)?.answer).toBe('Open: Squalane has 8.100 g/mL here, 0.810 in the book.')
    expect(at(0.82)).toBeUndefined()
    expect(at(0.3, noGround)?.answer).toContain('0.300 g/mL')
    expect(at(0.9, noGround)).toBeUndefined()
  })
})

describe('a person’s answer', () => {
  const answer = (askedAbout: string, more: object = {}) => ({
    ...{ question: 'salt', kind: 'answered' as const, note: 'Sugar does it', askedAbout },
    ...{ by: 'LB', at: '2026-03-02T10:00:00Z', number: 1 },
    ...more,
  })
  const saltless = cream.filter((one) => one !== salt)
  const asked = one(ask(saltless, joined, holding), 'salt')

  it('closes the question, or sets it aside, while what it rests on stays', () => {
    expect(asked?.isOpen).toBe(true)
    const given = ground({ ...holding, answers: [answer(asked?.askedAbout ?? '')] })
    expect(one(ask(saltless, joined, given), 'salt')).toMatchObject({
      ...{ isOpen: false, isAsked: true, isReopened: false },
      given: { note: 'Sugar does it', by: 'LB' },
    })
    // Lines in another order, and one of the other phase, are nothing that was asked about.
    const moved = [...saltless.toReversed(), line('Isoamyl Laurate', 'oil', 1, false)]
    expect(one(ask(moved, joined, given), 'salt')?.isOpen).toBe(false)
  })

  it('is open again when a line it rests on changed, and says what was answered', () => {
    const given = ground({ ...holding, answers: [answer(asked?.askedAbout ?? '')] })
    const changed = saltless.map((one) => (one === gum ? { ...gum, percentThousandths: 300 } : one))
    expect(one(ask(changed, joined, given), 'salt')).toMatchObject({
      ...{ isOpen: true, isReopened: true },
      given: { note: 'Sugar does it' },
    })
  })

  it('counts as the latest one says', () => {
    const answers = [
      answer(asked?.askedAbout ?? '', { note: 'Later', kind: 'set aside', at: '2026-03-03T10:00:00Z' }),
      answer(asked?.askedAbout ?? ''),
    ]
    expect(one(ask(saltless, joined, ground({ ...holding, answers })), 'salt')?.given?.note).toBe('Later')
  })

  it('of an earlier version holds again where what it rested on came back', () => {
    const answers = [
      answer('something else', { note: 'On the third', number: 3, at: '2026-05-01T10:00:00Z' }),
      answer(asked?.askedAbout ?? '', { note: 'On the first' }),
    ]
    const on = (given: typeof answers) =>
      one(ask(saltless, joined, ground({ ...holding, answers: given })), 'salt')
    expect(on(answers)).toMatchObject({ isOpen: false, given: { note: 'On the first', number: 1 } })
    expect(on(answers.slice(0, 1))).toMatchObject({ isOpen: true, isReopened: true, given: { number: 3 } })
  })
})
