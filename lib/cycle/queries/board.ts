import { sql, type RawBuilder } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import type { PlannedCycle } from '@/lib/protocol/schema'
import { isCurrentPress, isCurrentStep } from './current'
import type { CyclePress, WholeHalf } from '../rules/state'

/** Who wrote an entry, and the server's time of it; why, where it took the place of another. */
type Written = { byId: string; recordedAt: string; isVoid: boolean; correctionReason: string | null }
export type BoardStep = WholeHalf &
  Written & {
    id: string
    reachedC: number | null
    coreC: number | null
    isFrozenThrough: boolean | null
    heldHours: number
    heldReason: string
    note: string
    /** Null where it was typed from paper. */
    beginPressId: string | null
  }
export type BoardPress = CyclePress & Written & { id: string }
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
  return { ...(await labClock(db)), places }
}

/** The server's time, and in which zone the lab reads it. */
export async function labClock(db: Db | Trx): Promise<{ now: string; zone: string }> {
  const { rows } = await sql<{
    now: string
    zone: string
  }>`select app_now() as now, coalesce((select time_zone from lab limit 1), 'UTC') as zone`.execute(db)
  return rows[0]!
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
      pressesOf(isCurrentPress('p')).as('presses'),
      pressesOf(sql`p.press = 'begin' and not ${isCurrentPress('p')}`).as('pastBegins'),
      stepsOf(isCurrentStep('step')).as('steps'),
      stepsOf(sql`not ${isCurrentStep('step')}`).as('past'),
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

function pressesOf(which: RawBuilder<unknown>) {
  return sql<BoardPress[]>`(select coalesce(jsonb_agg(jsonb_build_object('id', p.id, 'cycle', p.cycle,
      'half', p.half, 'press', p.press, 'at', p.at, 'reason', p.reason, 'by', who.name, 'byId', p.recorded_by,
      'recordedAt', p.recorded_at, 'isVoid', p.is_void, 'correctionReason', p.correction_reason)
      order by p.at, p.recorded_at), '[]')
    from cycle_press p join person who on who.id = p.recorded_by
    where p.study_station_id = ss.id and ${which})`
}

/** Of a half that was held at the board, why is what was said there. */
function stepsOf(which: RawBuilder<unknown>) {
  return sql<BoardStep[]>`(select coalesce(jsonb_agg(jsonb_build_object('id', step.id, 'cycle', step.cycle,
      'half', step.half, 'begunAt', step.begun_at, 'endedAt', step.ended_at, 'reachedC', step.reached_c,
      'coreC', step.core_c, 'isFrozenThrough', step.is_frozen_through, 'heldHours', step.held_hours,
      'heldReason', coalesce(nullif(step.held_reason, ''), (select string_agg(distinct held.reason, ', ')
        from cycle_press held where held.study_station_id = ss.id and held.cycle = step.cycle
          and held.half = step.half and held.press = 'hold'
          and held.at between step.begun_at and step.ended_at), ''),
      'note', step.note, 'beginPressId', step.begin_press_id, 'by', who.name, 'byId', step.recorded_by,
      'recordedAt', step.recorded_at, 'isVoid', step.is_void, 'correctionReason', step.reason)
      order by step.cycle, step.begun_at, step.recorded_at), '[]')
    from cycle_step step join person who on who.id = step.recorded_by
    where step.study_station_id = ss.id and ${which})`
}
