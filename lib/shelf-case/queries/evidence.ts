import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import type { Actor } from '@/lib/auth/actor'
import { refuse } from '@/lib/http/errors'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { outsideResultsOf } from '@/lib/outside/queries'
import { loadFrame } from '@/lib/series/queries/frame'
import { assessStudy } from '@/lib/series/rules/assess'

export type Evidence = Awaited<ReturnType<typeof loadEvidence>>

/**
 * Everything a case is computed from, in thirteen statements whatever the size of the study. The series are judged anew
 * from the readings, so that what a case freezes is what its inputs give.
 */
export async function loadEvidence(db: Db | Trx, actor: Actor, studyId: string) {
  const study = await db
    .selectFrom('study')
    .select(['id', 'code', 'title', 'startedAt', 'startedOn', 'endWeeks', 'plan', 'clientId', 'state'])
    .select('protocolApproval')
    .where('id', '=', studyId)
    .executeTakeFirst()
  if (!study) throw refuse.notFound('There is no such study.')
  const lab = await db.selectFrom('lab').select(['name', 'timeZone']).executeTakeFirstOrThrow()
  const batches = await db
    .selectFrom('studyBatch as sb')
    .innerJoin('batch as b', 'b.id', 'sb.batchId')
    .innerJoin('formulaVersion as fv', 'fv.id', 'b.formulaVersionId')
    .innerJoin('formula as f', 'f.id', 'fv.formulaId')
    .select(['b.id', 'b.code', 'b.madeAt', 'f.name as formulaName', 'f.emulsionType', 'fv.number'])
    .where('sb.studyId', '=', studyId)
    // What stands beside the study for comparison supports no shelf life.
    .where('sb.isReference', '=', false)
    .orderBy('sb.position')
    .execute()
  const stations = await db
    .selectFrom('studyStation as ss')
    .innerJoin('station as s', 's.id', 'ss.stationId')
    .select([
      'ss.id',
      'ss.stationId',
      'ss.voice',
      'ss.isFreezeThaw',
      'ss.temperatureC',
      'ss.position',
      's.name',
      's.lowC',
      's.highC',
    ])
    .where('ss.studyId', '=', studyId)
    .orderBy('ss.position')
    .execute()
  const moves = await db
    .selectFrom('jarMove')
    .innerJoin('stationMove as m', 'm.id', 'jarMove.stationMoveId')
    .innerJoin('studyStation as ss', 'ss.id', 'jarMove.studyStationId')
    .innerJoin('station as origin', 'origin.id', 'm.fromStationId')
    .innerJoin('station as target', 'target.id', 'm.toStationId')
    .innerJoin('person as p', 'p.id', 'm.movedBy')
    .select(['ss.id as studyStationId', 'm.reason', 'm.movedAt', 'p.initials as movedBy'])
    .select(['origin.name as fromName', 'target.name as toName'])
    .select(({ fn }) => fn.countAll<number>().as('jars'))
    .where('ss.studyId', '=', studyId)
    .groupBy(['ss.id', 'm.id', 'origin.name', 'target.name', 'p.initials'])
    .orderBy('m.movedAt')
    .execute()
  const ids = batches.map((batch) => batch.id)
  const { assessed } = assessStudy(await loadFrame(db, studyId), null)
  const readings = await db
    .selectFrom('reading as r')
    .innerJoin('person as p', 'p.id', 'r.recordedBy')
    .leftJoin('jar as j', 'j.id', 'r.jarId')
    .select([
      'r.id',
      'r.batchId',
      'r.studyStationId',
      'r.attribute',
      'r.replicate',
      'r.value',
      'r.word',
      'r.typed',
      'r.detail',
      'r.isVoid',
      'r.supersedesId',
      'r.reason',
      'r.measuredAt',
      'r.recordedAt',
      'r.recordedBy',
      'p.initials as by',
      'j.code as jar',
    ])
    .where('r.studyId', '=', studyId)
    .where('r.batchId', 'in', ids)
    .orderBy('r.measuredAt')
    .orderBy('r.attribute')
    .orderBy('r.batchId')
    .orderBy('j.code')
    .orderBy('r.replicate')
    // A correction keeps the time of what it corrects, and stands right after it.
    .orderBy('r.recordedAt')
    .orderBy('r.id')
    .execute()
  const flags = await db
    .selectFrom('flag as f')
    .leftJoin('person as p', 'p.id', 'f.answeredBy')
    .select([
      'f.number',
      'f.level',
      'f.rule',
      'f.state',
      'f.sentence',
      'f.why',
      'f.action',
      'f.answeredAt',
      'f.studyStationId',
      'p.initials as answeredBy',
    ])
    .where('f.studyId', '=', studyId)
    .where('f.batchId', 'in', ids)
    .orderBy('f.number')
    .execute()
  const outside = await outsideResultsOf(db, studyId)
  const missed = await db
    .selectFrom('pullJar as pj')
    .innerJoin('pull', 'pull.id', 'pj.pullId')
    .innerJoin('jar as j', 'j.id', 'pj.jarId')
    .select(['j.code as jar', 'pull.label', 'pull.studyStationId', 'pj.missedReason'])
    .where('pj.studyId', '=', studyId)
    .where('pj.state', '=', 'missed')
    // Where another jar took its place, nothing is missing.
    .where(({ not, exists, selectFrom }) =>
      not(
        exists(
          selectFrom('pullJar as other')
            .select('other.id')
            .whereRef('other.standsInFor', '=', 'pj.id')
            .where('other.state', '!=', 'missed'),
        ),
      ),
    )
    .where('j.batchId', 'in', ids)
    .orderBy('pull.timeWeeks')
    .execute()
  const amendments = await db
    .selectFrom('studyAmendment as a')
    .innerJoin('person as p', 'p.id', 'a.madeBy')
    .select(['a.number', 'a.kind', 'a.sentence', 'a.reason', 'a.madeAt', 'p.initials as madeBy'])
    .where('a.studyId', '=', studyId)
    .orderBy('a.number')
    .execute()
  return {
    study: { ...study, plan: study.plan as ProtocolPlan },
    lab,
    batches,
    stations,
    series: assessed
      .filter(({ unit }) => ids.includes(unit.batch.id))
      .map(({ unit, input, finding }) => ({
        batchId: unit.batch.id,
        studyStationId: unit.station.id,
        attribute: unit.attribute,
        input,
        finding,
        // A jar's replicates are one reading to the rules, named by its first row.
        rowIds: new Map(unit.jars.map((jar) => [jar.id, jar.ids])),
      })),
    readings: readings.map((r) => ({ ...r, detail: r.detail as Record<string, unknown> })),
    flags,
    missed,
    outside,
    amendments,
    moves,
  }
}

/** The lab's stations whose temperature a station of the study had, one after the other, each with its entries. */
export async function loadStays(db: Db | Trx, studyStationId: string) {
  return db
    .selectFrom('studyStationStay as stay')
    .innerJoin('station', 'station.id', 'stay.stationId')
    .select(['station.name', 'station.lowC', 'station.highC'])
    .select(sql<string>`stay.from_at`.as('fromAt'))
    .select(
      sql<{ measuredAt: string; temperatureC: number }[]>`(select coalesce(jsonb_agg(jsonb_build_object(
          'measuredAt', t.measured_at, 'temperatureC', t.temperature_c) order by t.measured_at), '[]')
        from station_temperature t where t.station_id = stay.station_id and t.measured_at >= stay.from_at
          and t.measured_at < coalesce(stay.until_at, 'infinity'))`.as('entries'),
    )
    .where('stay.studyStationId', '=', studyStationId)
    .orderBy('stay.fromAt')
    .execute()
}
export type Stay = Awaited<ReturnType<typeof loadStays>>[number]
