import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { capital } from '@/lib/study/rules/words'
import { labClock } from '../queries/board'
import type { BoardStep, CyclePlace } from '../queries/board'
import { entriesOf } from '../rules/entries'
import { misfits } from '../rules/fits'
import { stepLines } from '../rules/half-words'
import { halfName } from '../rules/refusals'
import { orderOf } from '../rules/state'
import type { HalfChange } from '../schema'
import { claimPlace } from './claim-place'
import { refuseChange, voidPresses } from './change'
import { tellingDoubts, type HalfChanged } from './telling-doubts'

/**
 * A half that was typed wrong gets another in its place, or is taken back. Doubts that rested on it fall away, those of
 * the new one are raised, and both halves stay on record with the reason.
 */
export async function correctHalf(
  trx: Trx,
  actor: Actor,
  stepId: string,
  input: HalfChange,
): Promise<HalfChanged> {
  const asked = await trx
    .selectFrom('cycleStep')
    .select(['studyStationId', 'cycle', 'half'])
    .where('id', '=', stepId)
    .executeTakeFirst()
  if (!asked) throw refuse.notFound('There is no such half.')
  const place = await claimPlace(trx, asked.studyStationId)
  const entries = entriesOf(place, asked)
  if (entries.some(({ id }) => id === input.id)) return { id: input.id, doubted: 0, freed: 0 }
  const clock = await labClock(trx)
  const last = entries.at(-1)!
  refuseChange(place, actor, clock, {
    ...{ entry: last, version: entries.length, seen: input.version },
    ...{ name: halfName(asked), lines: stepLines(last, clock) },
  })
  const { id, change, reason, isConfirmed } = input
  if (change === 'run on') refuseRunOn(place, last)
  const half = change === 'correct' ? correctedHalf(place, last, input, clock.now) : null
  const { begunAt, endedAt, reachedC, coreC, isFrozenThrough, note, heldHours, heldReason } = half ?? last
  return tellingDoubts(
    trx,
    actor,
    place,
    { id, half: half && { ...half, id, cycle: last.cycle, half: last.half }, isConfirmed },
    async () => {
      await trx
        .insertInto('cycleStep')
        .values({
          ...{ id, studyStationId: place.id, cycle: last.cycle, half: last.half },
          ...{ begunAt, endedAt, reachedC, coreC, isFrozenThrough, note, heldHours, heldReason },
          ...{ beginPressId: last.beginPressId, claimedAt: half ? endedAt : null },
          ...{ supersedesId: last.id, isVoid: half === null, reason, recordedBy: actor.personId },
        })
        .execute()
      if (change === 'take back') await voidPresses(trx, actor, place, last, reason)
    },
  )
}

function correctedHalf(
  place: CyclePlace,
  last: BoardStep,
  input: Extract<HalfChange, { change: 'correct' }>,
  now: string,
) {
  const wrong = misfits(place, last, input, now)
  const [first] = Object.values(wrong)
  if (first) throw refuse.invalid(first, wrong)
  const { begunAt, endedAt, reachedC, note, heldHours, heldReason } = input
  const cold =
    last.half === 'cold'
      ? { coreC: input.coreC, isFrozenThrough: input.isFrozenThrough }
      : { coreC: null, isFrozenThrough: null }
  return { begunAt, endedAt, reachedC, note, heldHours, heldReason, ...cold }
}

/** An end that was pressed too early: the half runs as it ran, where nothing came after it. */
function refuseRunOn(place: CyclePlace, step: BoardStep): void {
  if (step.beginPressId === null)
    throw refuse.conflict(
      `${capital(halfName(step))} was typed from paper, so nothing runs on at the board. Take it back instead.`,
    )
  const later = [...place.steps, ...place.presses].find((one) => orderOf(one) > orderOf(step))
  if (later)
    throw refuse.conflict(
      `${capital(halfName(later))} has begun since, so ${halfName(step)} is over. Correct when it ended instead.`,
    )
}
