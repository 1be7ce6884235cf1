import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { AppError } from '@/lib/http/errors'
import { doubtsOf } from '@/lib/reading/queries/doubts'
import { recomputeSeries } from '@/lib/series/commands'
import type { CyclePlace } from '../queries/board'
import { doubtsChanged } from '../rules/half-words'
import { shortfalls } from '../rules/shortfall'
import { reachBackFromHalf } from './reach-back'

export type HalfChanged = { id: string; doubted: number; freed: number }
type Half = {
  id: string
  cycle: number
  half: string
  begunAt: string
  endedAt: string
  reachedC: number | null
  coreC: number | null
  isFrozenThrough: boolean | null
}
type Change = {
  id: string
  /** The half as it counts from now on; null where none does. */
  half: Half | null
  isConfirmed: boolean
}

/**
 * Writes a half, or what takes its place, with all that follows for readings taken after it; what follows is asked about
 * first, with its figures, and nothing is written until the person means it.
 */
export async function tellingDoubts(
  trx: Trx,
  actor: Actor,
  place: CyclePlace,
  { id, half, isConfirmed }: Change,
  write: () => Promise<unknown>,
): Promise<HalfChanged> {
  const before = await findDoubted(trx, place.id)
  await write()
  const hours = half ? (Date.parse(half.endedAt) - Date.parse(half.begunAt)) / 3_600_000 : 0
  const reached = half ? await reachBackFromHalf(trx, actor, place, { ...half, hours }) : 0
  const after = await findDoubted(trx, place.id)
  const changed = {
    doubted: [...after].filter((reading) => !before.has(reading)).length,
    freed: [...before].filter((reading) => !after.has(reading)).length,
  }
  const short = half ? shortfalls(place, { ...half, hours }, place.asked ?? undefined) : []
  if (!isConfirmed && (short.length > 0 || changed.doubted > 0 || changed.freed > 0)) {
    const sentence = [...short, ...doubtsChanged(changed, 'then', short.length > 0), 'Is it so?'].join(' ')
    throw new AppError(409, 'confirm', sentence, { detail: { ...changed, shortfalls: short } })
  }
  if (reached === 0 && changed.freed > 0) await recomputeSeries(trx, actor, place.studyId)
  return { id, ...changed }
}

/** Readings in force that a cycle doubts now. */
async function findDoubted(trx: Trx, studyStationId: string): Promise<Set<string>> {
  const { rows } = await sql<{ id: string }>`
    select r.id from reading r
    where r.study_station_id = ${studyStationId} and not r.is_void
      and not exists (select from reading newer where newer.supersedes_id = r.id)
      and exists (select from jsonb_array_elements(${doubtsOf('r')}) d where d ->> 'reason' = 'cycle')
  `.execute(trx)
  return new Set(rows.map(({ id }) => id))
}
