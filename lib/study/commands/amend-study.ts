import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { lockStudy, recomputeSeries } from '@/lib/series/commands'
import { getStudyHead, type StudyHead } from '@/lib/study/queries/head'
import { studiesOf } from '@/lib/study/queries/scope'
import type { AmendmentOf } from '@/lib/study/schema'
import { expectOne } from '@/lib/trail/queries'
import { addTimePoint, changeTolerance, endStation, pullRetain } from './amendments'

/** What an amendment does besides being written down. */
export type Amended = {
  sentence: string
  studyStationId?: string
  before?: unknown
  after?: unknown
  plan?: ProtocolPlan
  /** Attributes whose band moved; their series are judged anew from the same readings. */
  rejudged?: string[]
}
export type AmendedStudy = StudyHead & { number: number }

type Input =
  AmendmentOf<'time point'> | AmendmentOf<'retain'> | AmendmentOf<'station end'> | AmendmentOf<'tolerance'>

/**
 * Changes the plan of a running study from now on. It is written down with its reason and who, and nothing that was
 * read changes: series are judged anew from the same readings. Sent twice it happens once.
 */
export async function amendStudy(trx: Trx, actor: Actor, code: string, input: Input, now: string) {
  const found = await trx
    .selectFrom('study')
    .select('id')
    .where('code', '=', code)
    .where(studiesOf(actor))
    .executeTakeFirst()
  if (!found) throw refuse.notFound()
  await lockStudy(trx, found.id)
  const study = await getStudyHead(trx, actor, code)
  const sent = await trx
    .selectFrom('studyAmendment')
    .select(['id', 'number', 'sentence'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (sent) return { ...sent, version: study.version }
  if (study.state === 'closed') throw refuse.conflict(`${code} has ended, so nothing of it can be amended.`)
  if (study.version !== input.version) {
    await expectOne(trx, undefined, { table: 'study', id: study.id, thing: code })
  }
  const number = (study.amendments.at(-1)?.number ?? 0) + 1
  const amended = await carryOut(trx, actor, { ...study, number }, input, now)
  await trx
    .updateTable('study')
    .set({ version: study.version + 1, ...(amended.plan ? { plan: JSON.stringify(amended.plan) } : {}) })
    .where('id', '=', study.id)
    .execute()
  await trx
    .insertInto('studyAmendment')
    .values({
      id: input.id,
      studyId: study.id,
      number,
      kind: input.kind,
      studyStationId: amended.studyStationId ?? null,
      sentence: amended.sentence,
      before: JSON.stringify(amended.before ?? {}),
      after: JSON.stringify(amended.after ?? {}),
      reason: input.reason,
      madeBy: actor.personId,
    })
    .execute()
  const scope = amended.rejudged ? { only: amended.rejudged } : {}
  const { cleared } = await recomputeSeries(trx, actor, study.id, scope)
  if (amended.rejudged && cleared.length > 0) await sayWhyCleared(trx, study.id, cleared, number)
  return { id: input.id, number, sentence: amended.sentence, version: study.version + 1 }
}

function carryOut(trx: Trx, actor: Actor, study: AmendedStudy, input: Input, now: string): Promise<Amended> {
  switch (input.kind) {
    case 'time point':
      return addTimePoint(trx, study, input)
    case 'retain':
      return pullRetain(trx, study, input)
    case 'station end':
      return endStation(trx, actor, study, input, now)
    case 'tolerance':
      return changeTolerance(trx, study, input)
  }
}

/** A flag that a wider band closes was not closed by the readings, and its record says so. */
async function sayWhyCleared(trx: Trx, studyId: string, numbers: number[], amendment: number): Promise<void> {
  await trx
    .updateTable('flag')
    .set((eb) => ({
      closingNote: `Amendment ${amendment} changed the tolerance; the readings are the same.`,
      version: eb('version', '+', 1),
    }))
    .where('studyId', '=', studyId)
    .where('number', '=', sql<number>`any(${numbers})`)
    .execute()
}
