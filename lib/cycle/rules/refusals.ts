import { refuse } from '@/lib/http/errors'
import { capital } from '@/lib/study/rules/words'
import type { CycleState, Half } from './state'

export function halfName({ cycle, half }: { cycle: number; half: string }): string {
  return `the ${half} half of cycle ${cycle}`
}

/** Halves begin in their order, one at a time; what was pressed twice or by two people is told as it stands. */
export function refuseBegin(state: CycleState, asked: { cycle: number; half: Half }, cycles: number): void {
  if (state.kind === 'over')
    throw refuse.conflict(`All ${cycles} cycles of this study are over, so no half begins.`)
  if (state.kind === 'running') {
    throw refuse.conflict(
      isThis(state, asked)
        ? `${state.begunBy} has begun ${halfName(asked)} already. Reload to see it.`
        : `${capital(halfName(state))} still runs, since ${state.begunBy} began it. End it first.`,
    )
  }
  if (!isThis(state, asked)) throw refuse.conflict(`Next comes ${halfName(state)}. Reload to see it.`)
}

/** What is done to a half that runs: its end, a hold, going on. */
export function refuseUnlessRunning(state: CycleState, asked: { cycle: number; half: Half }) {
  if (state.kind === 'running' && isThis(state, asked)) return state
  throw refuse.conflict(
    state.kind === 'running'
      ? `${capital(halfName(asked))} does not run now: ${halfName(state)} does. Reload to see it.`
      : `${capital(halfName(asked))} does not run now. Reload to see what was pressed in the meantime.`,
  )
}

function isThis(state: { cycle: number; half: string }, asked: { cycle: number; half: string }): boolean {
  return state.cycle === asked.cycle && state.half === asked.half
}
