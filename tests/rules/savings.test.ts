import { describe, expect, it } from 'vitest'
import { missingInPlan } from '@/lib/protocol/rules/faults'
import { askedWeeks } from '@/lib/protocol/rules/plan'
import { readyMadePlan } from '@/lib/protocol/rules/ready-made'
import { plannedJars } from '@/lib/study/rules/jars'
import { adjustedPlan } from '@/lib/study/rules/plan'
import { savingsOf, withoutSaving, withSaving, type Saving } from '@/lib/study/rules/savings'
import { studyAdjustments, type StudyAdjustments } from '@/lib/study/schema'

const plan = readyMadePlan('screen', 'cream')
const one = { batchIds: ['a'], referenceIds: [] }
const offered = (adjustments: StudyAdjustments = {}, shortG: number | null = null) =>
  savingsOf(plan, adjustments, one, shortG)
const at = (savings: Saving[], act: RegExp) => savings.find((saving) => act.test(saving.act))!

describe('where grams can be saved', () => {
  it('is told when the batch is big enough too, the largest first, in jars and grams', () => {
    const savings = offered()
    expect(savings.length).toBeGreaterThanOrEqual(6)
    const grams = savings.map((saving) => saving.grams)
    expect(grams).toEqual(grams.toSorted((a, b) => b - a))
    const cold = at(savings, /^pH, viscosity, odour and feel at every second time point at 5 °C$/)
    // Of 1, 2, 3, 4, 5, 6, 8, 10, 12 the pulls of 2, 4, 6 and 10: four jars of 30 g, 3 % lost.
    expect(cold.jars).toBe(4)
    expect(cold.grams).toBeCloseTo((4 * 30) / 0.97, 6)
    expect(cold.cost).toMatch(/^A drift there is seen up to two weeks later\./)
    expect(cold.cost).toMatch(/warmer stations are compared with this one/)
    expect(at(savings, /second time point at 25 °C/).cost).toMatch(/^This station decides/)
  })

  it('computes what fewer times do to the bound of a trend', () => {
    const { widening } = at(offered(), /second time point at 40 °C/)
    expect(widening).toMatchObject({
      times: [0, 1, 2, 3, 4, 5, 6, 8, 10, 12],
      kept: [0, 1, 3, 5, 8, 12],
      at: 12,
    })
    // By hand: t(8) 1.860 with 10 times, t(4) 2.132 with 6 of them.
    const width = (t: number, times: number[]) => {
      const middle = times.reduce((sum, time) => sum + time, 0) / times.length
      const squares = times.reduce((sum, time) => sum + (time - middle) ** 2, 0)
      return t * Math.sqrt(1 / times.length + (12 - middle) ** 2 / squares)
    }
    const expected = width(2.132, widening!.kept) / width(1.86, widening!.times) - 1
    expect(widening!.percent).toBeCloseTo(100 * expected, 0)
  })

  it('is pressed and put back without a trace, and each takes what it says', () => {
    for (const saving of offered()) {
      const taken = withSaving({}, saving.adjustments)
      const jars = (of: StudyAdjustments) => plannedJars(adjustedPlan(plan, of), ['a']).length
      expect(jars({}) - jars(taken), saving.act).toBe(saving.jars)
      expect(studyAdjustments.parse(taken)).toEqual(taken)
      expect(missingInPlan(adjustedPlan(plan, taken)), saving.act).toBeNull()
      expect(adjustedPlan(plan, withoutSaving(taken, saving.adjustments))).toEqual(plan)
      expect(offered(taken).find((other) => other.key === saving.key)).toMatchObject({ isTaken: true })
    }
  })

  it('adds up, and putting one back leaves the others', () => {
    const [first, second] = [at(offered(), /at 5 °C/), at(offered(), /at 40 °C/)]
    const both = withSaving(withSaving({}, first.adjustments), second.adjustments)
    expect(both.everySecondTime).toEqual([0, 2])
    expect(withoutSaving(both, first.adjustments).everySecondTime).toEqual([2])
  })

  it('leaves the sealed jars their looks; where none stands, the pull goes', () => {
    const adjusted = adjustedPlan(plan, { everySecondTime: [0] }).stations[0]!
    expect(adjusted.timePoints).toEqual(plan.stations[0]!.timePoints)
    expect(askedWeeks(plan, adjusted, 'watch')).toEqual(adjusted.timePoints)
    expect(askedWeeks(plan, adjusted, 'measuring')).toEqual([1, 3, 5, 8, 12])
    const bare = { ...plan, stations: [{ ...plan.stations[0]!, watchJars: 0 }] }
    expect(adjustedPlan(bare, { everySecondTime: [0] }).stations[0]!.timePoints).toEqual([1, 3, 5, 8, 12])
  })

  it('fills a smaller height with less, and says what the ruler then tells', () => {
    const fill = at(offered(), /^Fill 24\.0 g instead of 30\.0 g$/)
    expect(adjustedPlan(plan, fill.adjustments)).toMatchObject({ fillG: 24, fillHeightMm: 32 })
    // 1 mm of 32 against 1 mm of 40.
    expect(fill.cost).toMatch(/3\.1 % of that instead of 2\.5 %/)
  })

  it('offers what would make a short batch do beside them', () => {
    const savings = offered({}, 1500)
    expect(at(savings, /^Leave out weeks 1 and 3$/).cost).toMatch(/seen up to one week later/)
    expect(at(savings, /^Fill 26\.9 g/).key).toBe('fit fill')
    expect(savings.filter((saving) => saving.act.startsWith('Fill'))).toHaveLength(1)
  })

  it('counts every batch and what stands beside them', () => {
    const three = savingsOf(plan, {}, { batchIds: ['a', 'b'], referenceIds: ['r'] }, null)
    expect(at(three, /second time point at 5 °C/).jars).toBe(12)
  })
})
