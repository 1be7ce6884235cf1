import type { BoardStep, CyclePlace } from '@/lib/cycle/queries/board'
import { cycleState } from '@/lib/cycle/rules/state'
import type { CyclePressInput } from '@/lib/cycle/schema'

/** The place as it will stand once these presses, still only on this device, have arrived in their order. */
export function withWaiting(place: CyclePlace, waiting: readonly CyclePressInput[], now: string): CyclePlace {
  return waiting.reduce((before, input) => {
    const { cycle, half } = input
    // A device whose clock is ahead presses nothing in the future.
    const at = input.claimedAt && input.claimedAt < now ? input.claimedAt : now
    if (input.press !== 'end') {
      const reason = input.press === 'begin' ? '' : (input.reason ?? '')
      const pressed = { cycle, half, press: input.press, at, reason, by: 'you' }
      return { ...before, presses: [...before.presses, pressed] }
    }
    const state = cycleState({ ...before, asked: before.asked ?? undefined }, at)
    if (state.kind !== 'running' || state.cycle !== cycle || state.half !== half) return before
    const { id, reachedC = null, coreC = null, isFrozenThrough = null, note = '' } = input
    const ended: BoardStep = {
      ...{ id, cycle, half, begunAt: state.begunAt, endedAt: at, by: 'you' },
      ...{ reachedC, coreC, isFrozenThrough, heldHours: state.heldHours, note },
    }
    return { ...before, steps: [...before.steps, ended] }
  }, place)
}
