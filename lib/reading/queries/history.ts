import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { howRead } from '../rules/how-read'
import { doubtsOf } from './doubts'
import { studiesOf } from '@/lib/study/queries/scope'

type Row = {
  id: string
  attribute: string
  replicate: number
  value: number | null
  word: string | null
  typed: string
  detail: Record<string, unknown>
  doubts: { reason: string; sentence: string }[]
  isVoid: boolean
  reason: string | null
  measuredAt: string
  claimedAt: string | null
  recordedAt: string
  by: string
  byName: string
  /** The one that counts, or the void that says none does. */
  isCurrent: boolean
}
/** `how` it was read: with a ruler, by lines on a photo; null where nothing tells. */
export type ReadingVersion = Row & { how: string | null }

/** Everything that was ever entered in this place, the first entry first; the last is the one in force. */
export async function readingHistory(db: Db, actor: Actor, id: string): Promise<ReadingVersion[]> {
  const { rows } = await sql<Row>`
    with recursive older as (
      select id, supersedes_id, 0 as depth from reading where id = ${id}
      union all
      select r.id, r.supersedes_id, older.depth - 1 from reading r join older on r.id = older.supersedes_id
    ), newer as (
      select id, 0 as depth from reading where id = ${id}
      union all
      select r.id, newer.depth + 1 from reading r join newer on r.supersedes_id = newer.id
    ), chain as (select id, depth from older union select id, depth from newer)
    select r.id, r.attribute, r.replicate, r.value, r.word, r.typed, r.detail, ${doubtsOf('r')} as doubts, r.is_void, r.reason,
      r.measured_at, r.claimed_at, r.recorded_at, p.initials as by, p.name as by_name,
      chain.depth = max(chain.depth) over () as is_current
    from chain join reading r on r.id = chain.id join person p on p.id = r.recorded_by
      join study on study.id = r.study_id
    where ${studiesOf(actor)}
    order by chain.depth
  `.execute(db)
  if (rows.length === 0) throw refuse.notFound('There is no such reading.')
  return rows.map((row) => ({ ...row, how: howRead(row) }))
}
