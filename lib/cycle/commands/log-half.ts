import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { capital } from '@/lib/study/rules/words'
import type { CyclePlace } from '../queries/board'
import { misfits } from '../rules/fits'
import { halfName } from '../rules/refusals'
import { cycleState, orderOf } from '../rules/state'
import type { CycleStep } from '../schema'
import { claimPlace } from './claim-place'
import { tellingDoubts, type HalfChanged } from './telling-doubts'

/** A whole half of a freeze-thaw cycle, typed later from paper. Sending it twice keeps one. */
export async function logCycleStep(
  trx: Trx,
  actor: Actor,
  { isConfirmed, ...input }: CycleStep,
  now: string,
): Promise<HalfChanged> {
  const place = await claimPlace(trx, input.studyStationId)
  if (place.studyState === 'closed')
    throw refuse.conflict(`Study ${place.studyCode} is closed, so it takes no more cycles.`)
  if ([...place.steps, ...place.past].some((step) => step.id === input.id))
    return { id: input.id, doubted: 0, freed: 0 }
  refuseOutOfTurn(place, input, now)
  const wrong = misfits(place, input, input, now)
  const [first] = Object.values(wrong)
  if (first) throw refuse.invalid(first, wrong)
  // Both times are claimed: it was typed after the fact.
  const step = {
    ...{ ...input, claimedAt: input.endedAt, recordedBy: actor.personId },
    isFrozenThrough: input.half === 'cold' ? input.isFrozenThrough : null,
  }
  return tellingDoubts(trx, actor, place, { id: step.id, half: step, isConfirmed }, () =>
    trx.insertInto('cycleStep').values(step).execute(),
  )
}

/** From paper comes what was left out before, or the half that is next. */
function refuseOutOfTurn(place: CyclePlace, input: Pick<CycleStep, 'cycle' | 'half'>, now: string): void {
  const { cycle, half } = input
  const logged = place.steps.find((step) => step.cycle === cycle && step.half === half)
  if (logged)
    throw refuse.conflict(
      `${capital(halfName(input))} is logged already, by ${logged.by}. Reload to see it.`,
      {
        by: logged.by,
      },
    )
  const state = cycleState({ ...place, asked: place.asked ?? undefined }, now)
  if (state.kind === 'running' && state.cycle === cycle && state.half === half)
    throw refuse.conflict(`${capital(halfName(input))} was begun at the board. End it there.`)
  if (cycle > place.cycles)
    throw refuse.conflict(`This study has ${place.cycles} cycles, and this is cycle ${cycle}. Type another.`)
  if (state.kind === 'running' && orderOf(input) > orderOf(state))
    throw refuse.conflict(
      `${capital(halfName(state))} still runs, since ${state.begunBy} began it. End it first.`,
    )
  if (state.kind === 'waiting' && orderOf(input) > orderOf(state))
    throw refuse.conflict(`Next comes ${halfName(state)}. Type that one first.`)
}
