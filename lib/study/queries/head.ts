import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { phaseFraction, type PhaseLine } from '@/lib/science/phase-fraction'
import { studiesOf } from './scope'
import { mishapsWhere } from './parts'

export type StudyAmendment = {
  number: number
  kind: string
  sentence: string
  reason: string
  madeBy: string
  madeOn: string
}

/** Jars that were moved, by move, with the stations of the study they belong to. */
export type StudyMove = {
  movedOn: string
  movedBy: string
  reason: string
  fromName: string
  toName: string
  jars: { position: number; count: number }[]
}
const movesOf = sql<StudyMove[]>`(select coalesce(jsonb_agg(jsonb_build_object(
      'movedOn', (m.moved_at at time zone coalesce((select time_zone from lab), 'UTC'))::date,
      'movedBy', p.name, 'reason', m.reason, 'fromName', origin.name, 'toName', target.name,
      'jars', (select jsonb_agg(jsonb_build_object('position', part.position, 'count', part.count) order by part.position)
        from (select own.position, count(*) from jar_move jm join study_station own on own.id = jm.study_station_id
          where jm.station_move_id = m.id and own.study_id = study.id group by own.position) part))
    order by m.moved_at), '[]')
  from station_move m join person p on p.id = m.moved_by
    join station origin on origin.id = m.from_station_id join station target on target.id = m.to_station_id
  where m.id in (select jm.station_move_id from jar_move jm join study_station own on own.id = jm.study_station_id
    where own.study_id = study.id))`.as('moves')

/** Days ahead on which a station with jars of the study is out of use, and the pulls that fall into them. */
export type StudyDowntime = { name: string; fromOn: string; toOn: string; reason: string; pulls: string[] }
const downtimesOf = sql<StudyDowntime[]>`(select coalesce(jsonb_agg(jsonb_build_object('name', place.name,
      'fromOn', d.from_on, 'toOn', d.to_on, 'reason', d.reason,
      'pulls', (select coalesce(jsonb_agg(distinct pull.label), '[]') from pull
        join pull_jar pj on pj.pull_id = pull.id and pj.state = 'due' join jar on jar.id = pj.jar_id
        where pull.study_id = study.id and jar.station_id = d.station_id and pull.due_on between d.from_on and d.to_on))
    order by d.from_on), '[]')
  from station_downtime d join station place on place.id = d.station_id
  where study.state = 'running' and d.to_on >= (app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date
    and not exists (select from station_downtime_cancel c where c.station_downtime_id = d.id)
    and exists (select from jar where jar.study_id = study.id and jar.station_id = d.station_id
      and jar.shelf is not null and jar.state in ('stored','pulled','resting')))`.as('downtimes')

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
    .select([movesOf, downtimesOf])
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
    .innerJoin('studyStationStay as stay', 'stay.studyStationId', 'studyStation.id')
    .innerJoin('station as place', 'place.id', 'stay.stationId')
    .where('stay.untilAt', 'is', null)
    .select([
      'studyStation.id',
      'studyStation.position',
      'studyStation.voice',
      'studyStation.isFreezeThaw',
      'studyStation.temperatureC',
      'studyStation.variant',
      'studyStation.endedOn',
      'place.id as stationId',
      'place.name',
      'station.kind',
      'station.cycleLowC',
      'station.cycleHighC',
    ])
    // Of jars that no pull asked for at that moment: a spare that broke on its shelf.
    .select(
      mishapsWhere(sql`m.study_id = study_station.study_id and m.pull_jar_id is null
        and its.study_station_id = study_station.id`),
    )
    .where('studyStation.studyId', '=', studyId)
    .orderBy('studyStation.position')
    .execute()
  return rows.toSorted((a, b) => heat(b) - heat(a) || a.position - b.position)
}
export type StudyStationRow = Awaited<ReturnType<typeof listStudyStations>>[number]

function heat({ kind, temperatureC }: { kind: string; temperatureC: number | null }): number {
  return kind === 'temperature' && temperatureC !== null ? temperatureC : -1000
}

/** The study's batches with what they are, references last, and the share of their internal phase by mass. */
export async function listStudyBatches(db: Db, studyId: string) {
  const rows = await db
    .selectFrom('studyBatch')
    .innerJoin('batch', 'batch.id', 'studyBatch.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'formula.code as formulaCode', 'formula.name as formulaName'])
    .select(['formula.emulsionType', 'studyBatch.isReference', 'batch.productLot'])
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
