import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { phaseFraction, type PhaseLine } from '@/lib/science/phase-fraction'
import { studiesOf } from './scope'

export type StudyAmendment = {
  number: number
  kind: string
  sentence: string
  reason: string
  madeBy: string
  madeOn: string
}

/** A study with the day it is in the lab: what every page of it begins with. */
export async function getStudyHead(db: Db, actor: Actor, code: string) {
  const study = await db
    .selectFrom('study')
    .innerJoin('protocolVersion', 'protocolVersion.id', 'study.protocolVersionId')
    .innerJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .innerJoin('person', 'person.id', 'study.createdBy')
    .leftJoin('client', 'client.id', 'study.clientId')
    .select([
      'study.id',
      'study.code',
      'study.title',
      'study.state',
      'study.startedAt',
      'study.startedOn',
      'study.endedOn',
      'study.endWeeks',
      'study.fillG',
      'study.isShared',
      'study.clientId',
      'study.version',
      'study.protocolApproval',
      'study.createdBy',
      'protocol.code as protocolCode',
      'protocol.name as protocolName',
      'protocolVersion.number as protocolNumber',
      'person.name as startedBy',
      'person.initials as startedByInitials',
      'client.name as clientName',
    ])
    .select((eb) => eb.ref('study.plan').$castTo<ProtocolPlan>().as('plan'))
    .select(
      sql<StudyAmendment[]>`(select coalesce(jsonb_agg(jsonb_build_object('number', a.number, 'kind', a.kind,
          'sentence', a.sentence, 'reason', a.reason, 'madeBy', p.name, 'madeOn', (a.made_at at time zone
            coalesce((select time_zone from lab), 'UTC'))::date) order by a.number), '[]')
        from study_amendment a join person p on p.id = a.made_by where a.study_id = study.id)`.as(
        'amendments',
      ),
    )
    .select((eb) => [
      sql<string>`(app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date`.as('today'),
      eb
        .exists(
          eb
            .selectFrom('studyFollower')
            .select('studyFollower.id')
            .whereRef('studyFollower.studyId', '=', 'study.id')
            .where('studyFollower.personId', '=', actor.personId),
        )
        .as('isFollowing'),
    ])
    .where('study.code', '=', code)
    .where(studiesOf(actor))
    .executeTakeFirst()
  if (!study) throw refuse.notFound()
  return { ...study, isFollowing: Boolean(study.isFollowing) }
}
export type StudyHead = Awaited<ReturnType<typeof getStudyHead>>

/** The study's stations, hottest first as they hang on the sheet, cycles and road at the foot. */
export async function listStudyStations(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('studyStation')
    .innerJoin('station', 'station.id', 'studyStation.stationId')
    .select([
      'studyStation.id',
      'studyStation.position',
      'studyStation.voice',
      'studyStation.isFreezeThaw',
      'studyStation.temperatureC',
      'studyStation.variant',
      'studyStation.endedOn',
      'station.id as stationId',
      'station.name',
      'station.kind',
      'station.cycleLowC',
      'station.cycleHighC',
    ])
    .where('studyStation.studyId', '=', studyId)
    .orderBy('studyStation.position')
    .execute()
  return rows.toSorted((a, b) => heat(b) - heat(a) || a.position - b.position)
}
export type StudyStationRow = Awaited<ReturnType<typeof listStudyStations>>[number]

function heat({ kind, temperatureC }: { kind: string; temperatureC: number | null }): number {
  return kind === 'temperature' && temperatureC !== null ? temperatureC : -1000
}

/** The study's batches with what they are, and the share of their internal phase by mass. */
export async function listStudyBatches(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('studyBatch')
    .innerJoin('batch', 'batch.id', 'studyBatch.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'formula.code as formulaCode', 'formula.name as formulaName'])
    .select('formula.emulsionType')
    .select((eb) =>
      eb
        .selectFrom('formulaLine')
        .whereRef('formulaLine.formulaVersionId', '=', 'formulaVersion.id')
        .select(
          sql<PhaseLine[]>`coalesce(jsonb_agg(jsonb_build_object('percent', percent_thousandths / 1000.0,
            'density', density, 'internal', is_internal)), '[]')`.as('lines'),
        )
        .as('lines'),
    )
    .where('studyBatch.studyId', '=', studyId)
    .orderBy('studyBatch.position')
    .execute()
  return rows.map(({ lines, ...batch }) => ({
    ...batch,
    internalPercent: lines?.length ? phaseFraction({ lines }).internalMassPercent : 0,
  }))
}
export type StudyBatchRow = Awaited<ReturnType<typeof listStudyBatches>>[number]
