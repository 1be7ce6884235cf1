import type { BoardPress, BoardStep, CyclePlace } from '@/lib/cycle/queries/board'
import { cycleState } from '@/lib/cycle/rules/state'
import type { BeginChangeInput, CyclePressInput, CycleStepInput, HalfChangeInput } from '@/lib/cycle/schema'

/** What can wait on this device for a place: a press, a half typed from paper, a change of a half or of its begin. */
export type Waiting =
  | { what: 'press'; input: CyclePressInput }
  | { what: 'paper'; input: CycleStepInput }
  | { what: 'half'; id: string; input: HalfChangeInput }
  | { what: 'begin'; id: string; input: BeginChangeInput }

/** The place as it will stand once these entries, still only on this device, have arrived in their order. */
export function withWaiting(place: CyclePlace, waiting: readonly Waiting[], now: string): CyclePlace {
  return waiting.reduce((before, one) => {
    switch (one.what) {
      case 'press':
        return withPress(before, one.input, now)
      case 'paper':
        return { ...before, steps: [...before.steps, { ...halfOf(one.input, now), beginPressId: null }] }
      case 'half':
        return withHalf(before, one.id, one.input, now)
      case 'begin':
        return withBegin(before, one.id, one.input, now)
    }
  }, place)
}

const mine = (now: string) => ({
  ...{ by: 'you', byId: '', recordedAt: now, isVoid: false, correctionReason: null },
})

function withPress(before: CyclePlace, input: CyclePressInput, now: string): CyclePlace {
  const { id, cycle, half } = input
  // A device whose clock is ahead presses nothing in the future.
  const at = input.claimedAt && input.claimedAt < now ? input.claimedAt : now
  if (input.press !== 'end') {
    const reason = input.press === 'begin' ? '' : (input.reason ?? '')
    const pressed: BoardPress = { ...mine(at), id, cycle, half, press: input.press, at, reason }
    return { ...before, presses: [...before.presses, pressed] }
  }
  const state = cycleState({ ...before, asked: before.asked ?? undefined }, at)
  if (state.kind !== 'running' || state.cycle !== cycle || state.half !== half) return before
  const held = before.presses.filter(
    (press) => press.press === 'hold' && press.cycle === cycle && press.half === half,
  )
  const ended: BoardStep = {
    ...halfOf({ ...input, begunAt: state.begunAt, endedAt: at }, at),
    heldHours: state.heldHours,
    heldReason: [...new Set(held.map(({ reason }) => reason))].join(', '),
    beginPressId: 'waits',
  }
  return { ...before, steps: [...before.steps, ended] }
}

type Typed = Pick<CycleStepInput, 'id' | 'cycle' | 'begunAt' | 'endedAt'> &
  Partial<Omit<CycleStepInput, 'half'>> & { half: string }

function halfOf(input: Typed, now: string): Omit<BoardStep, 'beginPressId'> {
  const { id, cycle, half, begunAt, endedAt } = input
  const { reachedC = null, coreC = null, isFrozenThrough = null, note = '' } = input
  const { heldHours = 0, heldReason = '' } = input
  return {
    ...{ ...mine(now), id, cycle, half, begunAt, endedAt },
    ...{ reachedC, coreC, isFrozenThrough, note, heldHours, heldReason },
  }
}

function withHalf(before: CyclePlace, stepId: string, input: HalfChangeInput, now: string): CyclePlace {
  const step = before.steps.find(({ id }) => id === stepId)
  if (!step) return before
  const { cycle, half, beginPressId } = step
  const others = before.steps.filter((one) => one !== step)
  if (input.change === 'correct') {
    const corrected = {
      ...halfOf({ ...input, cycle, half }, now),
      correctionReason: input.reason,
      beginPressId,
    }
    return { ...before, steps: [...others, corrected], past: [...before.past, step] }
  }
  const gone = { ...step, ...mine(now), id: input.id, isVoid: true, correctionReason: input.reason }
  const without = { ...before, steps: others, past: [...before.past, step, gone] }
  return input.change === 'run on' ? without : withoutPresses(without, step)
}

function withBegin(before: CyclePlace, pressId: string, input: BeginChangeInput, now: string): CyclePlace {
  const begun = before.presses.find(({ id }) => id === pressId)
  if (!begun) return before
  const next = { ...begun, ...mine(now), id: input.id, correctionReason: input.reason }
  if (input.change === 'take back')
    return withoutPresses(
      { ...before, pastBegins: [...before.pastBegins, begun, { ...next, isVoid: true }] },
      begun,
    )
  const others = before.presses.filter((one) => one !== begun)
  return {
    ...before,
    presses: [{ ...next, at: input.begunAt }, ...others],
    pastBegins: [...before.pastBegins, begun],
  }
}

function withoutPresses(place: CyclePlace, { cycle, half }: { cycle: number; half: string }): CyclePlace {
  return { ...place, presses: place.presses.filter((one) => one.cycle !== cycle || one.half !== half) }
}
