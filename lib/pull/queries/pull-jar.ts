import { sql } from 'kysely'
import { isCurrentStep } from '@/lib/cycle/queries/current'
import type { Db, Trx } from '@/lib/db/client'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { usedInstruments } from '@/lib/instrument/queries/used'
import type { JarStay } from '@/lib/station/rules/moves'

export type CycleHalf = {
  id: string
  cycle: number
  half: string
  endedAt: string
  reachedC: number | null
  coreC: number | null
  isFrozenThrough: boolean | null
  hours: number
}
export type PullJar = NonNullable<Awaited<ReturnType<typeof findPullJar>>>

/** An entry of the request that is on record already, whatever became of it since. */
export type KeptEntry = {
  id: string
  pullJarId: string | null
  recordedBy: string
  attribute: string
  replicate: number
  value: number | null
  typed: string
  detail: Record<string, unknown>
  instrumentId: string | null
  doubts: { reason: string; sentence: string }[]
  measuredAt: string
}

type Sent = { instrumentIds?: string[]; entryIds?: string[] }

/** One jar asked for in a pull, with all that a reading of it is judged by. */
export async function findPullJar(
  db: Db | Trx,
  pullJarId: string,
  { instrumentIds = [], entryIds = [] }: Sent = {},
) {
  return db
    .selectFrom('pullJar as pj')
    .innerJoin('pull', 'pull.id', 'pj.pullId')
    .innerJoin('study', 'study.id', 'pj.studyId')
    .innerJoin('studyStation as ss', 'ss.id', 'pull.studyStationId')
    .innerJoin('station as origin', 'origin.id', 'ss.stationId')
    .innerJoin('jar', 'jar.id', 'pj.jarId')
    .innerJoin('station', 'station.id', 'jar.stationId')
    .leftJoin('person as opener', 'opener.id', 'pj.openedBy')
    .leftJoin('person as closer', 'closer.id', 'pj.closedBy')
    .select([
      'pj.id',
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
      'pj.closedBy',
      'pj.closedAt',
      'closer.name as closerName',
      'closer.initials as closerInitials',
      'pj.missedReason',
      'pj.note',
      'pull.id as pullId',
      'pull.label',
      'pull.timeWeeks',
      'pull.dueOn',
      'pull.windowFrom',
      'pull.windowTo',
      'study.id as studyId',
      'study.code as studyCode',
      'study.state as studyState',
      'study.startedAt',
      'ss.id as studyStationId',
      'ss.isFreezeThaw',
      'ss.temperatureC',
      'ss.position',
      'station.name as stationName',
      'origin.kind as stationKind',
      'origin.cycleLowC',
      'origin.cycleHighC',
      'jar.id as jarId',
      'jar.code',
      'jar.kind',
      'jar.state as jarState',
      'jar.batchId',
      'jar.tareG',
      'jar.grossG',
      'jar.fillHeightMm',
    ])
    .select([
      sql<ProtocolPlan>`study.plan`.as('plan'),
      sql<string>`app_now()`.as('now'),
      usedInstruments(sql`i.id = any(${instrumentIds}::uuid[])`).as('instruments'),
      sql<KeptEntry[]>`(select coalesce(jsonb_agg(jsonb_build_object('id', r.id, 'pullJarId', r.pull_jar_id,
          'recordedBy', r.recorded_by, 'attribute', r.attribute, 'replicate', r.replicate, 'value', r.value,
          'typed', r.typed, 'detail', r.detail, 'instrumentId', r.instrument_id, 'doubts', r.doubts, 'measuredAt', r.measured_at) order by r.id), '[]')
        from reading r where r.id = any(${entryIds}::uuid[]))`.as('keptEntries'),
      sql<boolean>`exists (select from jar_mishap m where m.pull_jar_id = pj.id and m.kind = 'pulled early')`.as(
        'isPulledEarly',
      ),
      sql<
        CycleHalf[]
      >`(select coalesce(jsonb_agg(jsonb_build_object('id', step.id, 'cycle', step.cycle, 'half', step.half,
          'endedAt', step.ended_at, 'reachedC', step.reached_c, 'coreC', step.core_c,
          'isFrozenThrough', step.is_frozen_through, 'hours', extract(epoch from step.ended_at - step.begun_at) / 3600)), '[]')
        from cycle_step step where step.study_station_id = ss.id and ${isCurrentStep('step')})`.as(
        'cycleHalves',
      ),
      sql<JarStay[]>`(select coalesce(jsonb_agg(jsonb_build_object('at', m.moved_at, 'name', target.name,
          'kind', target.kind, 'temperatureC', target.temperature_c, 'cycleLowC', target.cycle_low_c,
          'cycleHighC', target.cycle_high_c,
          'isLit', target.light_lux is not null or target.light_uv_wm2 is not null) order by m.moved_at), '[]')
        from jar_move jm join station_move m on m.id = jm.station_move_id
          join station target on target.id = m.to_station_id where jm.jar_id = jar.id)`.as('stays'),
    ])
    .where('pj.id', '=', pullJarId)
    .executeTakeFirst()
}
