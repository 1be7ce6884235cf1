import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { capital } from '@/lib/study/rules/words'
import { labClock } from '../queries/board'
import type { BoardPress, CyclePlace } from '../queries/board'
import { beginsOf } from '../rules/entries'
import { misfits } from '../rules/fits'
import { beginLines } from '../rules/half-words'
import { halfName } from '../rules/refusals'
import type { BeginChange } from '../schema'
import { refuseChange, voidPresses } from './change'
import { claimPlace } from './claim-place'

/** The begin of a half that runs: another time takes its place, or it is taken back with all that was pressed of it. */
export async function correctBegin(trx: Trx, actor: Actor, pressId: string, input: BeginChange) {
  const asked = await trx
    .selectFrom('cyclePress')
    .select(['studyStationId', 'cycle', 'half'])
    .where('id', '=', pressId)
    .executeTakeFirst()
  if (!asked) throw refuse.notFound('There is no such half.')
  const place = await claimPlace(trx, asked.studyStationId)
  const begins = beginsOf(place, asked)
  const { id, reason } = input
  if (begins.some((begin) => begin.id === id)) return { id }
  const clock = await labClock(trx)
  const last = begins.at(-1)!
  refuseChange(place, actor, clock, {
    ...{ entry: last, version: begins.length, seen: input.version },
    ...{ name: halfName(asked), lines: beginLines(last, clock) },
  })
  const ended = place.steps.find((step) => step.cycle === asked.cycle && step.half === asked.half)
  if (ended)
    throw refuse.conflict(
      `${ended.by} has ended ${halfName(asked)} since. Correct it as a whole: reload to see it.`,
      { by: ended.by },
    )
  if (input.change === 'take back') await voidPresses(trx, actor, place, last, reason, id)
  else {
    refuseTime(place, last, input.begunAt, clock.now)
    await trx
      .insertInto('cyclePress')
      .values({
        ...{ id, studyStationId: place.id, cycle: last.cycle, half: last.half, press: 'begin' },
        ...{ at: input.begunAt, claimedAt: input.begunAt, supersedesId: last.id },
        ...{ correctionReason: reason, recordedBy: actor.personId },
      })
      .execute()
  }
  return { id }
}

function refuseTime(place: CyclePlace, last: BoardPress, begunAt: string, now: string): void {
  const wrong = misfits(place, last, { begunAt }, now)
  const held = place.presses.find(
    ({ press, cycle, half, at }) =>
      press === 'hold' && cycle === last.cycle && half === last.half && Date.parse(at) < Date.parse(begunAt),
  )
  const sentence =
    wrong['begunAt'] ?? (held ? `By then ${held.by} held ${halfName(last)}. Correct the time.` : undefined)
  if (sentence) throw refuse.invalid(capital(sentence), { begunAt: sentence })
}
