import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import type { MishapKind } from '@/lib/jar/schema'
import type { ProtocolPlan } from '@/lib/protocol/schema'

export type BenchJarRow = Awaited<ReturnType<ReturnType<typeof jarsToRead>['execute']>>[number]

/** One row per jar asked for in a pull, with where it stands and who has it. */
export function jarsToRead(db: Db | Trx) {
  return db
    .selectFrom('pullJar as pj')
    .innerJoin('pull', 'pull.id', 'pj.pullId')
    .innerJoin('study', 'study.id', 'pj.studyId')
    .innerJoin('studyStation as ss', 'ss.id', 'pull.studyStationId')
    .innerJoin('jar', 'jar.id', 'pj.jarId')
    .innerJoin('station', 'station.id', 'jar.stationId')
    .innerJoin('batch', 'batch.id', 'jar.batchId')
    .innerJoin('studyBatch as sb', (join) =>
      join.onRef('sb.studyId', '=', 'pj.studyId').onRef('sb.batchId', '=', 'jar.batchId'),
    )
    .innerJoin('formulaVersion as fv', 'fv.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'fv.formulaId')
    .leftJoin('person as opener', 'opener.id', 'pj.openedBy')
    .leftJoin('person as closer', 'closer.id', 'pj.closedBy')
    .select([
      'pj.id as pullJarId',
      'pj.version',
      'pj.asks',
      'pj.state',
      'pj.attribute',
      'pj.repeatOf',
      'pj.openedBy',
      'pj.openedAt',
      'opener.name as openerName',
      'opener.initials as openerInitials',
      'pj.takenAt',
      'pj.restUntil',
      'pj.closedAt',
      'closer.name as closerName',
      'closer.initials as closerInitials',
      'pj.missedReason',
      'pj.note',
      'pull.id as pullId',
      'pull.timeWeeks',
      'pull.label',
      'pull.dueOn',
      'pull.windowFrom',
      'pull.windowTo',
      'study.id as studyId',
      'study.code as studyCode',
      'study.title as studyTitle',
      'study.state as studyState',
      'study.startedAt',
      'study.endWeeks',
      'ss.id as studyStationId',
      'ss.isFreezeThaw',
      'ss.voice',
      'ss.position',
      'ss.variant',
      'ss.temperatureC',
      'station.id as stationId',
      'station.name as stationName',
      'station.kind as stationKind',
      'station.caution',
      'jar.id as jarId',
      'jar.code',
      'jar.kind',
      'jar.state as jarState',
      'jar.shelf',
      'jar.place',
      'jar.tareG',
      'jar.grossG',
      'jar.fillHeightMm',
      'batch.id as batchId',
      'batch.code as batchCode',
      'formula.name as formulaName',
      'formula.emulsionType',
      'sb.isReference',
    ])
    .select([
      sql<ProtocolPlan>`study.plan`.as('plan'),
      // Of a jar that is still open: what of it is on record, so that only the rest is asked for.
      sql<
        string[]
      >`case when pj.state in ('due', 'resting') then (select coalesce(jsonb_agg(distinct r.attribute), '[]')
        from reading r where r.pull_jar_id = pj.id and not r.is_void
          and not exists (select from reading newer where newer.supersedes_id = r.id)) else '[]'::jsonb end`.as(
        'read',
      ),
      sql<string | null>`(select jar.code from pull_jar original join jar on jar.id = original.jar_id
        where original.id = pj.stands_in_for)`.as('standsInFor'),
      sql<
        { kind: MishapKind; reason: string; by: string; at: string }[]
      >`(select coalesce(jsonb_agg(jsonb_build_object(
          'kind', m.kind, 'reason', m.reason, 'by', by.initials, 'at', m.happened_at) order by m.recorded_at), '[]')
        from jar_mishap m join person by on by.id = m.recorded_by where m.pull_jar_id = pj.id)`.as('mishaps'),
    ])
}
