import { describe, expect, it } from 'vitest'
import { batchFinding, isTypeAsStated } from '@/lib/batch/rules/finding'
import { batchValue, initialForStudy, initialOf, isTorqueJar } from '@/lib/batch/rules/readings'
import { restOf } from '@/lib/batch/rules/rest'
import { deviations, stepCautions, stepTimes } from '@/lib/batch/rules/steps'
import {
  gramsIn,
  instrumentDoubt,
  percentOffText,
  readWeight,
  targetGrams,
  toleranceGrams,
  weighed,
} from '@/lib/batch/rules/weighing'

describe('weighing', () => {
  it('scales a share to the batch', () => {
    expect(targetGrams(2000, 2600)).toBe(52)
    expect(targetGrams(333.3, 12_345)).toBeCloseTo(41.14589, 4)
  })

  it('allows the tolerance of the batch, its ends included, and no less than a balance shows', () => {
    expect(weighed(52, 51.74, 0.5).isWithin).toBe(true)
    expect(weighed(52, 52.26, 0.5).isWithin).toBe(true)
    expect(weighed(52, 52.27, 0.5).isWithin).toBe(false)
    expect(toleranceGrams(0.5, 0.5)).toBe(0.01)
    expect(weighed(0.5, 0.51, 0.5).isWithin).toBe(true)
  })

  it('says what to do in grams', () => {
    expect(weighed(52, 51.62, 0.5).words).toBe('0.38 g to go')
    expect(weighed(52, 53, 0.5).words).toBe('1.00 g too much')
    expect(percentOffText(weighed(52, 51.62, 0.5).differencePercent)).toBe('\u22120.73 %')
    expect(weighed(0, 1, 0.5).differencePercent).toBeNull()
    expect(weighed(52, 52.5, 1).isWithin).toBe(true)
  })

  it('adds portions up and leaves out what was corrected', () => {
    const portions = [
      { id: 'a', netG: 200.1, supersedes: null },
      { id: 'b', netG: 100.2, supersedes: null },
      { id: 'c', netG: 80.2, supersedes: 'b' },
    ]
    expect(gramsIn(portions)).toBe(280.3)
    expect(gramsIn([])).toBe(0)
  })

  it('takes the tare off and says at which field nothing is left', () => {
    expect(readWeight('312,45', '32.4', false)).toEqual({ netG: 280.05 })
    expect(readWeight('30', '32.4', false)).toMatchObject({ field: 'tareTyped' })
    expect(readWeight('0', '', false)).toMatchObject({ field: 'actualTyped' })
    expect(readWeight('0', '', true)).toEqual({ netG: 0 })
    expect(readWeight('12', 'pot', false)).toMatchObject({ field: 'tareTyped' })
  })

  it('says what is doubtful about a balance', () => {
    const good = { code: 'B2', result: 'good', dueOn: '2026-03-02', detail: null }
    expect(instrumentDoubt(good, '2026-03-02')).toBeNull()
    expect(instrumentDoubt(good, '2026-03-03')).toBe('The check of B2 was due on 2 Mar 2026.')
    expect(instrumentDoubt({ ...good, result: null, dueOn: null }, '2026-03-02')).toContain('no check')
    expect(instrumentDoubt({ ...good, result: 'doubtful' }, '2026-03-02')).toContain('failed its last check')
  })
})

describe('a step', () => {
  const asked = { speedRpm: 300, minutes: 44, temperatureC: 25 }
  it('is explained where it lies beyond what is allowed, and not where nothing was noted', () => {
    const near = { actualSpeedRpm: 330, actualMinutes: 48.4, actualTemperatureC: 27 }
    expect(deviations(asked, near)).toEqual([])
    expect(deviations(asked, { ...near, actualSpeedRpm: 331, actualTemperatureC: 22.9 })).toEqual([
      '331 rpm where 300 rpm was prescribed',
      '22.9 °C where 25 °C was prescribed',
    ])
    const none = { actualSpeedRpm: null, actualMinutes: null, actualTemperatureC: null }
    expect(deviations(asked, none)).toEqual([])
  })

  it('counts its minutes from the two presses', () => {
    const start = { kind: 'start', happenedAt: '2026-03-02T08:00:00.000Z' }
    const end = { kind: 'end', happenedAt: '2026-03-02T08:44:30.000Z' }
    expect(stepTimes([start, end]).minutes).toBe(44.5)
    expect(stepTimes([start])).toMatchObject({ startedAt: start.happenedAt, endedAt: null, minutes: null })
    const again = { kind: 'start', happenedAt: '2026-03-02T09:00:00.000Z' }
    expect(stepTimes([start, end, again]).endedAt).toBeNull()
  })

  it('says what burns and what breaks', () => {
    const step = { instruction: 'Melt in a glass beaker', temperatureC: 75, caution: '' }
    expect(stepCautions(step)).toHaveLength(2)
    expect(stepCautions({ ...step, instruction: 'Stir', temperatureC: 25, caution: 'Slowly' })).toEqual([
      'Slowly',
    ])
  })
})

describe('readings of a batch', () => {
  it('make a viscosity of a torque and an RCF of a rotor', () => {
    const torque = { attribute: 'viscosity' as const, typed: '62', detail: { spindle: 'T-bar C', rpm: 10 } }
    // 62 % of 100 000 mPa·s at full scale.
    expect(batchValue(torque, [{ name: 'T-bar C', constant: 10_000 }])).toMatchObject({ value: 62_000 })
    expect(batchValue(torque, [])).toMatchObject({ field: 'detail.spindle' })
    const spun = {
      attribute: 'centrifuge' as const,
      typed: '0,5',
      detail: { rpm: 3000, radiusMm: 100, minutes: 30 },
    }
    // 1.118e-6 × 100 × 9 000 000
    expect(batchValue(spun, [])).toMatchObject({ value: 0.5, detail: { rcf: expect.closeTo(1006.2, 6) } })
    expect(batchValue({ ...spun, detail: { rpm: 3000, minutes: 30 } }, [])).toMatchObject({
      field: 'detail.radiusMm',
    })
    expect(batchValue({ attribute: 'ph', typed: '15', detail: {} }, [])).toMatchObject({ field: 'typed' })
    expect(batchValue({ attribute: 'look', typed: 'White', detail: {} }, [])).toMatchObject({ value: null })
  })

  it('give the initial as the mean of what counts', () => {
    const reading = { moment: 'initial', attribute: 'viscosity', supersedes: null }
    const readings = [
      { ...reading, id: 'a', replicate: 1, value: 60_000 },
      { ...reading, id: 'b', replicate: 2, value: 6_400 },
      { ...reading, id: 'c', replicate: 2, value: 64_000, supersedes: 'b' },
    ]
    expect(initialOf(readings, 'initial', 'viscosity')).toBe(62_000)
    expect(initialOf(readings, 'initial', 'ph')).toBeNull()
  })

  it('are offered to a study as they are typed there, a torque only with the same spindle and speed', () => {
    const reading = { moment: 'initial', attribute: 'viscosity', supersedes: null, instrumentId: 'v1' }
    const detail = { spindle: 'T-bar C', rpm: 10, torquePercent: 62 }
    const readings = [{ ...reading, id: 'a', replicate: 1, value: 62_000, typed: '62', detail }]
    const asked = { attribute: 'viscosity', replicates: 3, torque: { spindle: 'T-bar C', rpm: 10 } }
    expect(initialForStudy(readings, asked)).toEqual({ texts: ['62'], instrumentId: 'v1' })
    expect(initialForStudy(readings, { ...asked, torque: null })?.texts).toEqual(['62000'])
    expect(initialForStudy(readings, { ...asked, torque: { spindle: 'T-bar D', rpm: 10 } })).toBeNull()
    expect(initialForStudy(readings, { ...asked, attribute: 'ph' })).toBeNull()
  })

  it('wait for the rest and ask for the torque of every tenth jar', () => {
    expect(restOf(3.5)).toMatchObject({ toWait: '20 h 30 min', isOver: false })
    expect(restOf(24).toWait).toBeNull()
    expect(restOf(73).isOver).toBe(true)
    expect([1, 2, 10, 11, 21].filter(isTorqueJar)).toEqual([1, 11, 21])
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
