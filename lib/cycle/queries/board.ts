import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import type { PlannedCycle } from '@/lib/protocol/schema'
import { isCurrentStep } from './current'
import type { CyclePress, WholeHalf } from '../rules/state'

export type BoardStep = WholeHalf & {
  id: string
  reachedC: number | null
  coreC: number | null
  isFrozenThrough: boolean | null
  heldHours: number
  note: string
}
export type BoardJar = { code: string; label: string; kind: string; isToRead: boolean }
export type CycleBoard = Awaited<ReturnType<typeof cycleBoard>>
export type CyclePlace = CycleBoard['places'][number]

/** Every freeze-thaw station of a running study: what was pressed, which halves are whole, which jars wait to be looked at. */
export async function cycleBoard(db: Db | Trx, _actor: Actor) {
  const places = await placesInCycle(db)
    .where('study.state', '=', 'running')
    .where('ss.endedOn', 'is', null)
    .orderBy('station.walkOrder')
    .orderBy('study.code')
    .execute()
  const { rows } = await sql<{
    now: string
    zone: string
  }>`select app_now() as now, coalesce((select time_zone from lab limit 1), 'UTC') as zone`.execute(db)
  return { ...rows[0]!, places }
}

/** One of them, for who presses. */
export async function findCyclePlace(trx: Db | Trx, studyStationId: string) {
  return placesInCycle(trx).where('ss.id', '=', studyStationId).executeTakeFirst()
}

function placesInCycle(db: Db | Trx) {
  return db
    .selectFrom('studyStation as ss')
    .innerJoin('study', 'study.id', 'ss.studyId')
    .innerJoin('station', 'station.id', 'ss.stationId')
    .select([
      'ss.id',
      'study.id as studyId',
      'study.code as studyCode',
      'study.title as studyTitle',
      'study.state as studyState',
      'station.id as stationId',
      'station.name as stationName',
      'station.cycleLowC',
      'station.cycleHighC',
      'station.caution',
    ])
    .select([
      sql<PlannedCycle | null>`study.plan -> 'stations' -> ss.position -> 'cycle'`.as('asked'),
      sql<number>`coalesce(jsonb_array_length(study.plan -> 'stations' -> ss.position -> 'timePoints'), 0)`.as(
        'cycles',
      ),
      sql<
        CyclePress[]
      >`(select coalesce(jsonb_agg(jsonb_build_object('cycle', p.cycle, 'half', p.half, 'press', p.press,
          'at', p.at, 'reason', p.reason, 'by', who.name) order by p.at, p.recorded_at), '[]')
        from cycle_press p join person who on who.id = p.recorded_by where p.study_station_id = ss.id)`.as(
        'presses',
      ),
      sql<
        BoardStep[]
      >`(select coalesce(jsonb_agg(jsonb_build_object('id', step.id, 'cycle', step.cycle, 'half', step.half,
          'begunAt', step.begun_at, 'endedAt', step.ended_at, 'reachedC', step.reached_c, 'coreC', step.core_c,
          'isFrozenThrough', step.is_frozen_through, 'heldHours', step.held_hours, 'note', step.note,
          'by', who.name) order by step.cycle, step.begun_at), '[]')
        from cycle_step step join person who on who.id = step.recorded_by where step.study_station_id = ss.id
          and ${isCurrentStep('step')})`.as('steps'),
      sql<number>`(select count(*)::int from jar where jar.study_station_id = ss.id
          and jar.state in ('stored','pulled','resting'))`.as('jarsInCycle'),
      sql<BoardJar[]>`(select coalesce(jsonb_agg(jsonb_build_object('code', jar.code, 'label', pull.label,
          'kind', jar.kind, 'isToRead', pj.state in ('due','resting')) order by jar.kind desc, jar.code), '[]')
        from pull_jar pj join pull on pull.id = pj.pull_id join jar on jar.id = pj.jar_id
        where pull.study_station_id = ss.id and pull.due_on <= (app_now() at time zone
            coalesce((select time_zone from lab limit 1), 'UTC'))::date + 1
          and (pj.state in ('due','resting') or pj.closed_at > app_now() - interval '2 days'))`.as(
        'inspections',
      ),
    ])
    .where('ss.isFreezeThaw', '=', true)
}
