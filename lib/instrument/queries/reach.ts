import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { laterCheck } from '../rules/trust'
import type { Reached } from '../schema'

export type ReachedReading = { id: string; studyId: string; code: string; attribute: string }

/**
 * Readings in force that were taken with the instrument between the good calibration or check before this instant and
 * the good one after it, and that do not carry the doubt yet.
 */
export async function reachedReadings(
  db: Db | Trx,
  instrumentId: string,
  at: string,
): Promise<ReachedReading[]> {
  const { rows } = await sql<ReachedReading>`
    select r.id, r.study_id, study.code, r.attribute
    from reading r join study on study.id = r.study_id
    where r.instrument_id = ${instrumentId}
      and r.measured_at > coalesce(${goodSince(instrumentId, at)}, '-infinity'::timestamptz)
      and r.measured_at < coalesce((select min(at) from ${events(instrumentId)} e
        where result = 'good' and at > ${at}::timestamptz), 'infinity'::timestamptz)
      and not r.is_void
      and not exists (select from reading newer where newer.supersedes_id = r.id)
      and not exists (select from reading_doubt d where d.reading_id = r.id and d.reason = ${laterCheck})
      and not (r.measured_at > ${at}::timestamptz and r.doubts @> '[{"reason":"calibration"}]')
    order by r.study_id, r.id
  `.execute(db)
  return rows
}

/** How many readings of which studies, for who has to confirm it. */
export async function reachOf(db: Db | Trx, instrumentId: string, at: string): Promise<Reached> {
  const readings = await reachedReadings(db, instrumentId, at)
  const { rows } = await sql<{
    since: string | null
  }>`select ${goodSince(instrumentId, at)} as since`.execute(db)
  const codes = [...new Set(readings.map((reading) => reading.code))].toSorted()
  return {
    readings: readings.length,
    studies: codes.map((code) => ({ code, readings: readings.filter((one) => one.code === code).length })),
    since: rows[0]?.since ?? null,
  }
}

function goodSince(instrumentId: string, at: string) {
  return sql<string | null>`(select max(at) from ${events(instrumentId)} e
    where result = 'good' and at < ${at}::timestamptz)`
}

function events(instrumentId: string) {
  return sql`(select calibrated_at as at, result from calibration where instrument_id = ${instrumentId}
    union all select checked_at, result from instrument_check where instrument_id = ${instrumentId})`
}
