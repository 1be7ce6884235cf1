import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { lockStudy, recomputeSeries } from '@/lib/series/commands'
import { dayIn } from '@/lib/study/rules/calendar'
import { findCyclePlace } from '../queries/board'
import type { HalfInstead } from '../schema'
import { reachBackFromHalf } from './reach-back'

/**
 * A half that was typed wrong gets another in its place, or is taken back. Doubts that rested on it fall away, those of
 * the new one are raised, and both halves stay on record with the reason.
 */
export async function correctHalf(trx: Trx, actor: Actor, stepId: string, input: HalfInstead) {
  const found = await findStep(trx, stepId)
  if (!found) throw refuse.notFound('There is no such half.')
  await lockStudy(trx, found.studyId)
  const step = (await findStep(trx, stepId))!
  if (step.newerId === input.id) return { id: input.id }
  refuseChange(actor, step)
  const place = (await findCyclePlace(trx, step.studyStationId))!
  const { reason, isVoid, id } = input
  const { begunAt, endedAt, reachedC, coreC, isFrozenThrough, note } = isVoid ? step : input
  if (Date.parse(endedAt) > Date.parse(step.now)) {
    throw refuse.invalid('This end lies ahead. Correct the time.', { endedAt: 'This time lies ahead.' })
  }
  await trx
    .insertInto('cycleStep')
    .values({
      ...{ id, studyStationId: step.studyStationId, cycle: step.cycle, half: step.half },
      ...{ begunAt, endedAt, reachedC, coreC, isFrozenThrough, note },
      ...{ heldHours: step.heldHours, beginPressId: step.beginPressId, claimedAt: endedAt },
      ...{ supersedesId: stepId, isVoid, reason, recordedBy: actor.personId },
    })
    .execute()
  const hours = (Date.parse(endedAt) - Date.parse(begunAt)) / 3_600_000
  const { cycle, half } = step
  const kept = { id, cycle, half, endedAt, reachedC, coreC, isFrozenThrough, hours }
  const reached = isVoid ? 0 : await reachBackFromHalf(trx, actor, place, kept)
  if (reached === 0) await recomputeSeries(trx, actor, step.studyId)
  return { id }
}

type Step = NonNullable<Awaited<ReturnType<typeof findStep>>>

/** As with a reading: one's own entry on its day, a formulator any. */
function refuseChange(actor: Actor, step: Step): void {
  if (step.studyState === 'closed')
    throw refuse.conflict(`Study ${step.studyCode} is closed, so its cycles stay as they are.`)
  if (step.isVoid || step.newerId)
    throw refuse.stale(
      'This half was corrected or taken back since you opened it. Reload, then look again.',
      {
        currentId: step.newerId,
      },
    )
  if (actor.roles.includes('formulator')) return
  if (step.recordedBy !== actor.personId)
    throw refuse.forbidden(`${step.by} logged this half. Ask them, or a formulator, to change it.`)
  if (dayIn(step.zone, step.recordedAt) !== dayIn(step.zone, step.now))
    throw refuse.forbidden('The day of this entry is over. Ask a formulator to change it.')
}

async function findStep(trx: Trx, id: string) {
  return trx
    .selectFrom('cycleStep as step')
    .innerJoin('studyStation as ss', 'ss.id', 'step.studyStationId')
    .innerJoin('study', 'study.id', 'ss.studyId')
    .innerJoin('person', 'person.id', 'step.recordedBy')
    .leftJoin('cycleStep as newer', 'newer.supersedesId', 'step.id')
    .select(['step.id', 'step.studyStationId', 'step.cycle', 'step.half', 'step.begunAt', 'step.endedAt'])
    .select(['step.reachedC', 'step.coreC', 'step.isFrozenThrough', 'step.note', 'step.heldHours'])
    .select(['step.beginPressId', 'step.isVoid', 'step.recordedBy', 'step.recordedAt'])
    .select(['newer.id as newerId', 'ss.studyId', 'person.name as by'])
    .select(['study.state as studyState', 'study.code as studyCode'])
    .select([
      sql<string>`app_now()`.as('now'),
      sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'),
    ])
    .where('step.id', '=', id)
    .executeTakeFirst()
}
