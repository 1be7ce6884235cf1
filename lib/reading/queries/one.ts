import { sql } from 'kysely'
import type { Db, Trx } from '@/lib/db/client'
import { usedInstruments } from '@/lib/instrument/queries/used'
import { doubtsOf } from './doubts'
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
      doubtsOf('r').as('doubts'),
      sql<string>`app_now()`.as('now'),
      sql<Record<string, unknown> | null>`(select first.detail from reading first
        where first.study_id = r.study_id and first.batch_id = r.batch_id and first.attribute = r.attribute
          and first.study_station_id is null and not first.is_void
          and not exists (select from reading later where later.supersedes_id = first.id)
        order by first.replicate, first.id limit 1)`.as('initialDetail'),
      sql<
        string | null
      >`(select coalesce(nullif(b.emulsion_type_found, 'not clear'), f.emulsion_type) from batch b
        left join formula_version fv on fv.id = b.formula_version_id left join formula f on f.id = fv.formula_id
        where b.id = r.batch_id)`.as('emulsionType'),
      sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'),
      usedInstruments(sql`i.id = coalesce(${instrumentId}::uuid, r.instrument_id)`).as('instruments'),
    ])
    .where('r.id', '=', id)
    .executeTakeFirst()
}
