import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import type { ProtocolPlan } from '@/lib/protocol/schema'

export type ReadingRow = NonNullable<Awaited<ReturnType<typeof findReading>>>

/** One reading with its study, its jar and what superseded it. */
export async function findReading(db: Db | Trx, id: string, instrumentId: string | null = null) {
  return db
    .selectFrom('reading as r')
    .innerJoin('study', 'study.id', 'r.studyId')
    .innerJoin('person as author', 'author.id', 'r.recordedBy')
    .leftJoin('jar', 'jar.id', 'r.jarId')
    .leftJoin('reading as newer', 'newer.supersedesId', 'r.id')
    .leftJoin('person as changer', 'changer.id', 'newer.recordedBy')
    .select([
      'r.id',
      'r.studyId',
      'r.batchId',
      'r.studyStationId',
      'r.pullJarId',
      'r.jarId',
      'r.attribute',
      'r.replicate',
      'r.value',
      'r.word',
      'r.typed',
      'r.instrumentId',
      'r.isVoid',
      'r.measuredAt',
      'r.claimedAt',
      'r.recordedBy',
      'r.recordedAt',
      'author.name as authorName',
      'study.code as studyCode',
      'study.state as studyState',
      'jar.code as jarCode',
      'jar.tareG',
      'jar.grossG',
      'jar.fillHeightMm',
      'newer.id as newerId',
      'newer.isVoid as isNewerVoid',
      'newer.reason as newerReason',
      'changer.name as changerName',
    ])
    .select([
      sql<ProtocolPlan>`study.plan`.as('plan'),
      sql<Record<string, unknown>>`r.detail`.as('detail'),
      sql<{ reason: string; sentence: string }[]>`r.doubts`.as('doubts'),
      sql<string>`app_now()`.as('now'),
      sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'),
      sql<{ name: string; constant: number }[] | null>`(select spindles from instrument
        where id = coalesce(${instrumentId}::uuid, r.instrument_id))`.as('spindles'),
    ])
    .where('r.id', '=', id)
    .executeTakeFirst()
}
