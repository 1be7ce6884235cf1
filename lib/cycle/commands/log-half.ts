import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudy } from '@/lib/series/commands'
import { capital } from '@/lib/study/rules/words'
import { findCyclePlace } from '../queries/board'
import { isCurrentStep } from '../queries/current'
import { halfName } from '../rules/refusals'
import type { CycleStep } from '../schema'
import { reachBackFromHalf } from './reach-back'

/** A whole half of a freeze-thaw cycle, typed later from paper. Sending it twice keeps one. */
export async function logCycleStep(trx: Trx, actor: Actor, input: CycleStep, now: string) {
  const place = await trx
    .selectFrom('studyStation as ss')
    .innerJoin('study', 'study.id', 'ss.studyId')
    .innerJoin('station', 'station.id', 'ss.stationId')
    .select(['ss.isFreezeThaw', 'ss.studyId', 'study.state', 'study.code', 'station.name'])
    .where('ss.id', '=', input.studyStationId)
    .executeTakeFirst()
  if (!place) throw refuse.notFound('There is no such station in a study.')
  await lockStudy(trx, place.studyId)
  if (!place.isFreezeThaw)
    throw refuse.conflict(`${place.name} is no freeze-thaw station, so it has no cycles.`)
  if (place.state === 'closed')
    throw refuse.conflict(`Study ${place.code} is closed, so it takes no more cycles.`)
  if (Date.parse(input.endedAt) > Date.parse(now)) {
    throw refuse.invalid('A half is logged after it ended, and this end lies ahead. Correct the time.', {
      endedAt: 'This time lies ahead.',
    })
  }
  const logged = await trx
    .selectFrom('cycleStep')
    .select(['id', 'half'])
    .select(isCurrentStep('cycleStep').as('isCurrent'))
    .where('studyStationId', '=', input.studyStationId)
    .where('cycle', '=', input.cycle)
    .execute()
  if (logged.some((step) => step.id === input.id)) return { id: input.id }
  if (logged.some((step) => step.half === input.half && step.isCurrent)) {
    throw refuse.conflict(
      `The ${input.half} half of cycle ${input.cycle} is logged already. Reload to see it.`,
    )
  }
  const begun = await trx
    .selectFrom('cyclePress')
    .select('id')
    .where('studyStationId', '=', input.studyStationId)
    .where('cycle', '=', input.cycle)
    .where('half', '=', input.half)
    .executeTakeFirst()
  if (begun) throw refuse.conflict(`${capital(halfName(input))} was begun at the board. End it there.`)
  await trx
    .insertInto('cycleStep')
    // Both times are claimed: it was typed after the fact.
    .values({ ...input, claimedAt: input.endedAt, recordedBy: actor.personId })
    .execute()
  const { id, cycle, half, endedAt, reachedC, coreC, isFrozenThrough } = input
  const hours = (Date.parse(endedAt) - Date.parse(input.begunAt)) / 3_600_000
  const kept = { id, cycle, half, endedAt, reachedC, coreC, isFrozenThrough, hours }
  await reachBackFromHalf(trx, actor, (await findCyclePlace(trx, input.studyStationId))!, kept)
  return { id }
}
