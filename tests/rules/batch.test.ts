import { describe, expect, it } from 'vitest'
import {
  batchFinding,
  isTypeAsStated,
  percentOffText,
  targetGrams,
  toleranceGrams,
  weighed,
} from '@/lib/batch/rules'

describe('weighing', () => {
  it('scales a share to the batch', () => {
    expect(targetGrams(2000, 2600)).toBe(52)
    expect(targetGrams(333.3, 12_345)).toBeCloseTo(41.14589, 4)
  })

  it('allows half a percent, its ends included, and no less than a balance shows', () => {
    expect(weighed(52, 51.74).isWithin).toBe(true)
    expect(weighed(52, 52.26).isWithin).toBe(true)
    expect(weighed(52, 52.27).isWithin).toBe(false)
    expect(toleranceGrams(0.5)).toBe(0.01)
    expect(weighed(0.5, 0.51).isWithin).toBe(true)
  })

  it('says what to do in grams', () => {
    expect(weighed(52, 51.62).words).toBe('0.38 g to go')
    expect(weighed(52, 53).words).toBe('1.00 g too much')
    expect(percentOffText(weighed(52, 51.62).differencePercent)).toBe('\u22120.73 %')
    expect(weighed(0, 1).differencePercent).toBeNull()
  })
})

describe('the emulsion-type test', () => {
  it('tells which phase is outside and not which oil it is', () => {
    expect(isTypeAsStated('water-in-silicone', 'water-in-oil')).toBe(true)
    expect(isTypeAsStated('water-in-oil', 'oil-in-water')).toBe(false)
    expect(isTypeAsStated('oil-in-water', 'not clear')).toBe(false)
    expect(isTypeAsStated('oil-in-water', null)).toBe(false)
  })
})

describe('the finding', () => {
  const batch = {
    state: 'making' as const,
    weighings: [
      { actualG: 52, phase: 'A' },
      { actualG: null, phase: 'B' },
    ],
    steps: [{ doneAt: null }],
    ...{ yieldG: null, restedHours: null, emulsionType: 'water-in-oil' },
    ...{ emulsionTypeFound: null, decisionReason: null },
  }

  it('says where the batch stands and what waits', () => {
    expect(batchFinding(batch)).toEqual({
      strong: '1 of 2',
      rest: ' lines weighed',
      sentence: 'Phase B is next. 1 process step to do.',
    })
    expect(batchFinding({ ...batch, state: 'resting', restedHours: 3.7 }).strong).toBe('3 h')
    const tested = { ...batch, state: 'resting' as const, emulsionTypeFound: 'oil-in-water' as const }
    expect(batchFinding(tested).strong).toBe('Tested oil-in-water, designed water-in-oil')
    const released = { ...tested, state: 'released' as const, yieldG: 1968 }
    expect(batchFinding(released).strong).toBe('1\u2009968 g')
    expect(batchFinding({ ...batch, state: 'rejected', decisionReason: 'Spilled' }).sentence).toBe('Spilled')
  })
})
