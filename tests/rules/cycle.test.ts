import { describe, expect, it } from 'vitest'
import { withWaiting } from '@/components/cycle/waiting-presses'
import type { CyclePlace } from '@/lib/cycle/queries/board'
import { doubtsChanged } from '@/lib/cycle/rules/half-words'
import { shortfalls } from '@/lib/cycle/rules/shortfall'
import { cycleState, type CyclePress, type CycleRecord, type Running } from '@/lib/cycle/rules/state'
import type { CyclePressInput } from '@/lib/cycle/schema'

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

describe('what waits on the device', () => {
  const place = {
    ...record({ presses: [{ ...press('begin', friday), id: 'begun' } as CyclePress] }),
    ...{ past: [], pastBegins: [], asked: null },
  } as unknown as CyclePlace
  const half = { studyStationId: place.id, cycle: 1, half: 'cold' as const }
  const end = { ...half, id: 'a', press: 'end' as const, claimedAt: after(16) }
  const change = { version: 1, reason: 'misread' }
  const stands = (waiting: Parameters<typeof withWaiting>[1], now: string) => {
    const then = withWaiting(place, waiting, now)
    return { ...then, state: cycleState({ ...then, asked: undefined }, now) }
  }
  const pressed = (...inputs: CyclePressInput[]) => inputs.map((input) => ({ what: 'press' as const, input }))

  it('an end and the next beginning move the place on to its warm half, once and in order', () => {
    const begun = { ...half, half: 'warm' as const, id: 'b', press: 'begin' as const, claimedAt: after(17) }
    expect(stands(pressed(end), after(18)).state).toMatchObject({
      ...{ kind: 'waiting', half: 'warm', since: after(16) },
    })
    const running = { kind: 'running', half: 'warm', begunAt: after(17), begunBy: 'you', hours: 1 }
    expect(stands(pressed(end, begun), after(18)).state).toMatchObject(running)
  })

  it('a device whose clock is ahead presses nothing in the future', () => {
    const held = { ...half, id: 'c', press: 'hold' as const, reason: 'weekend', claimedAt: after(30) }
    expect(stands(pressed(held), after(2)).state).toMatchObject({
      hold: { since: after(2), reason: 'weekend', by: 'you' },
    })
  })

  it('an end without a beginning changes nothing', () => {
    const ended = { ...half, half: 'warm' as const, id: 'd', press: 'end' as const, claimedAt: after(3) }
    expect(stands(pressed(ended), after(4)).state).toMatchObject({ kind: 'running', half: 'cold' })
  })

  it('an end that is corrected there counts as corrected, and the one before stays beside it', () => {
    const times = { begunAt: friday, endedAt: after(15), reachedC: -11 }
    const input = { ...change, ...times, id: 'e', change: 'correct' as const }
    const { steps, past, state } = stands([...pressed(end), { what: 'half', id: 'a', input }], after(18))
    expect(state).toMatchObject({ kind: 'waiting', half: 'warm', since: after(15) })
    expect(steps).toMatchObject([{ id: 'e', reachedC: -11, correctionReason: 'misread' }])
    expect(past).toMatchObject([{ id: 'a' }])
  })

  it('an end taken back leaves the half as not begun, or running where it had not ended', () => {
    const taken = (what: 'take back' | 'run on') =>
      stands(
        [...pressed(end), { what: 'half', id: 'a', input: { ...change, id: 'f', change: what } }],
        after(18),
      )
    expect(taken('take back').state).toMatchObject({ kind: 'waiting', cycle: 1, half: 'cold' })
    expect(taken('run on').state).toMatchObject({ kind: 'running', half: 'cold', begunAt: friday })
  })

  it('a corrected begin and a half from paper count as well', () => {
    const input = { ...change, id: 'g', change: 'correct' as const, begunAt: after(-2) }
    const corrected = stands([{ what: 'begin', id: 'begun', input }], after(18))
    expect(corrected.state).toMatchObject({ kind: 'running', hours: 20, begunBy: 'you' })
    expect(corrected.pastBegins).toMatchObject([{ id: 'begun' }])
    const back = {
      what: 'begin' as const,
      id: 'begun',
      input: { ...change, id: 'h', change: 'take back' as const },
    }
    const paper = { ...half, id: 'i', begunAt: friday, endedAt: after(16) }
    expect(stands([back, { what: 'paper', input: paper }], after(18)).state).toMatchObject({
      ...{ kind: 'waiting', cycle: 1, half: 'warm' },
    })
  })
})

describe('what a change does to readings, in words', () => {
  it.each([
    [{ doubted: 0, freed: 0 }, false, []],
    [
      { doubted: 1, freed: 0 },
      false,
      ['One reading taken after it carries a doubt then, until someone answers it.'],
    ],
    [
      { doubted: 0, freed: 3 },
      false,
      ['Three readings taken after it carry no doubt because of it any longer.'],
    ],
    [
      { doubted: 0, freed: 0 },
      true,
      ['Readings taken after it carry a doubt then, until someone answers it.'],
    ],
  ])('%o', (changed, isAhead, expected) => {
    expect(doubtsChanged(changed, 'then', isAhead)).toEqual(expected)
  })
})
