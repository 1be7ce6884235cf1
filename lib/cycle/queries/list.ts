import { isClientOnly, type Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { isCurrentStep } from './current'

export type CycleStepRow = Awaited<ReturnType<typeof listCycleSteps>>[number]

/** The halves logged so far at a freeze-thaw station of a study. */
export async function listCycleSteps(db: Db, actor: Actor, studyStationId: string) {
  return db
    .selectFrom('cycleStep as step')
    .innerJoin('studyStation as ss', 'ss.id', 'step.studyStationId')
    .innerJoin('study', 'study.id', 'ss.studyId')
    .innerJoin('person', 'person.id', 'step.recordedBy')
    .select([
      'step.id',
      'step.cycle',
      'step.half',
      'step.begunAt',
      'step.endedAt',
      'step.reachedC',
      'step.coreC',
      'step.isFrozenThrough',
      'step.heldHours',
      'step.heldReason',
      'step.claimedAt',
      'step.note',
      'step.recordedAt',
      'step.supersedesId',
      'step.isVoid',
      'step.reason',
      'person.initials as recordedBy',
    ])
    .select(isCurrentStep('step').as('isCurrent'))
    .where('step.studyStationId', '=', studyStationId)
    .$if(isClientOnly(actor), (query) =>
      query.where('study.isShared', '=', true).where('study.clientId', '=', actor.clientId),
    )
    .orderBy('step.cycle')
    .orderBy('step.begunAt')
    .orderBy('step.recordedAt')
    .execute()
}
