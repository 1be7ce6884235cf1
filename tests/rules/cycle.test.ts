import { describe, expect, it } from 'vitest'
import { withWaiting } from '@/components/cycle/waiting-presses'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { cycleState, type CyclePress, type CycleRecord, type Running } from '@/lib/cycle/rules/state'

const friday = '2026-03-06T16:00:00Z'
const after = (hours: number) => new Date(Date.parse(friday) + hours * 3_600_000).toISOString()
const press = (kind: string, at: string, more: Partial<CyclePress> = {}): CyclePress => ({
  cycle: 1,
  half: 'cold',
  press: kind,
  at,
  reason: 'weekend',
  by: 'Mada',
  ...more,
})
const record = (more: Partial<CycleRecord> = {}): CycleRecord => ({
  cycles: 2,
  asked: { coldHours: 16, warmHours: 8, isFrozenThrough: true },
  steps: [],
  presses: [],
  ...more,
})
const step = (cycle: number, half: string, begunAt: string, endedAt: string) => ({
  cycle,
  half,
  begunAt,
  endedAt,
  by: 'Jos',
})

describe('where a freeze-thaw station stands', () => {
  it('cold, then warm, then the next cycle, until all are over', () => {
    expect(cycleState(record(), friday)).toMatchObject({ kind: 'waiting', cycle: 1, half: 'cold' })
    const cold = step(1, 'cold', friday, after(16))
    const warm = step(1, 'warm', after(16), after(24))
    expect(cycleState(record({ steps: [cold] }), after(16))).toMatchObject({ cycle: 1, half: 'warm' })
    expect(cycleState(record({ steps: [warm, cold] }), after(24))).toMatchObject({ cycle: 2, half: 'cold' })
    expect(cycleState(record({ cycles: 1, steps: [cold, warm] }), after(24))).toMatchObject({ kind: 'over' })
  })

  it('counts hours elapsed and left, is due when they are over and overdue an hour later', () => {
    const presses = [press('begin', friday)]
    const at = (hours: number) => cycleState(record({ presses }), after(hours)) as Running
    expect(at(10)).toMatchObject({ hours: 10, leftHours: 6, isDue: false, isOverdue: false })
    expect(at(16.5)).toMatchObject({ leftHours: 0, isDue: true, isOverdue: false })
    expect(at(17.1)).toMatchObject({ isDue: true, isOverdue: true })
  })

  it('a weekend hold puts the end off to Monday, and the half is not overdue', () => {
    const held = [press('begin', friday), press('hold', after(1))]
    const sunday = cycleState(record({ presses: held }), after(40)) as Running
    expect(sunday).toMatchObject({ dueAt: null, isDue: false, isOverdue: false, hold: { reason: 'weekend' } })
    const monday = [...held, press('go on', after(64))]
    const at = (hours: number) => cycleState(record({ presses: monday }), after(hours)) as Running
    expect(at(64.5)).toMatchObject({ dueAt: after(64), isDue: true, isOverdue: false, heldHours: 63 })
    expect(at(66)).toMatchObject({ isOverdue: true })
  })

  it('a half whose end is told late was not held by what was pressed after that end', () => {
    const presses = [press('begin', friday), press('hold', after(2)), press('go on', after(4))]
    const at = (hours: number) => cycleState(record({ presses }), after(hours)) as Running
    expect(at(1)).toMatchObject({ hours: 1, heldHours: 0, hold: null })
    expect(at(3)).toMatchObject({ hours: 3, heldHours: 1 })
  })

  it('a hold that is over before the half is due changes nothing but the record', () => {
    const presses = [press('begin', friday), press('hold', after(2)), press('go on', after(4))]
    expect(cycleState(record({ presses }), after(10))).toMatchObject({ dueAt: after(16), heldHours: 2 })
  })

  it('without prescribed hours nothing is ever overdue', () => {
    const presses = [press('begin', friday)]
    expect(cycleState(record({ asked: undefined, presses }), after(400))).toMatchObject({
      dueAt: null,
      leftHours: null,
      isOverdue: false,
    })
  })
})

describe('in what a half fell short', () => {
  const place = { cycleLowC: -10, cycleHighC: 25 }
  const asked = { coldHours: 16, warmHours: 8, isFrozenThrough: true }
  const half = { cycle: 1, half: 'cold', reachedC: -10, isFrozenThrough: true, hours: 16 }

  it.each([
    ['a whole one', {}, []],
    ['an hour for loading', { hours: 15.2 }, []],
    ['hours', { hours: 12.5 }, ['It lasted 12.5 of 16 h.']],
    ['its temperature', { reachedC: -6 }, ['It reached −6 °C, −10 °C is asked for.']],
    ['not frozen through', { isFrozenThrough: false }, ['The jars were not frozen through.']],
    ["the dummy jar's core", { coreC: -2 }, ["The dummy jar's core reached −2 °C, −10 °C is asked for."]],
    ['a cool thaw', { half: 'warm', reachedC: 20, hours: 8 }, ['It reached 20 °C, 25 °C is asked for.']],
  ])('%s', (_name, more, expected) => {
    expect(shortfalls(place, { ...half, ...more }, asked)).toEqual(expected)
  })
})

describe('presses that wait on the device', () => {
  const place = { ...record({ presses: [press('begin', friday)] }), asked: null } as unknown as CyclePlace
  const half = { studyStationId: place.id, cycle: 1, half: 'cold' as const }
  const state = (waiting: Parameters<typeof withWaiting>[1], now: string) =>
    cycleState({ ...withWaiting(place, waiting, now), asked: undefined }, now)

  it('an end and the next beginning move the place on to its warm half, once and in order', () => {
    const ended = { ...half, id: 'a', press: 'end' as const, claimedAt: after(16) }
    const begun = { ...half, half: 'warm' as const, id: 'b', press: 'begin' as const, claimedAt: after(17) }
    expect(state([ended], after(18))).toMatchObject({ kind: 'waiting', half: 'warm', since: after(16) })
    const running = { kind: 'running', half: 'warm', begunAt: after(17), begunBy: 'you', hours: 1 }
    expect(state([ended, begun], after(18))).toMatchObject(running)
  })

  it('a device whose clock is ahead presses nothing in the future', () => {
    const held = { ...half, id: 'c', press: 'hold' as const, reason: 'weekend', claimedAt: after(30) }
    expect(state([held], after(2))).toMatchObject({ hold: { since: after(2), reason: 'weekend', by: 'you' } })
  })

  it('an end without a beginning changes nothing', () => {
    const ended = { ...half, half: 'warm' as const, id: 'd', press: 'end' as const, claimedAt: after(3) }
    expect(state([ended], after(4))).toMatchObject({ kind: 'running', half: 'cold' })
  })
})
