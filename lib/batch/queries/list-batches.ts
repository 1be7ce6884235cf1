import { sql } from 'kysely'
import { jsonArrayFrom } from 'kysely/helpers/postgres'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type { BatchListQuery, BatchState } from '../schema'

const order = {
  code: sql`batch.code`,
  formula: sql`formula.name`,
  size: sql`batch.size_g`,
  yield: sql`batch.yield_g`,
  state: sql`batch.state`,
  made: sql`coalesce(batch.made_at, batch.created_at)`,
}

export async function listBatches(db: Db, _actor: Actor, query: BatchListQuery) {
  const typed = `%${query.q
    .trim()
    .toLowerCase()
    .replace(/[\\%_]/g, '\\$&')}%`
  const rows = await db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .innerJoin('person', 'person.id', 'batch.createdBy')
    .select((eb) => [
      'batch.id',
      'batch.code',
      'batch.sizeG',
      'batch.yieldG',
      'batch.state',
      'batch.madeAt',
      'batch.createdAt',
      'batch.emulsionTypeFound',
      'formula.code as formulaCode',
      'formula.name as formulaName',
      'formula.emulsionType',
      'formulaVersion.number as versionNumber',
      'person.initials as createdBy',
      eb
        .selectFrom('batchWeighing')
        .select((sub) => sub.fn.countAll<number>().as('count'))
        .whereRef('batchWeighing.batchId', '=', 'batch.id')
        .as('lines'),
      eb
        .selectFrom('batchWeighing')
        .select((sub) => sub.fn.count<number>('batchWeighing.actualG').as('count'))
        .whereRef('batchWeighing.batchId', '=', 'batch.id')
        .as('linesWeighed'),
      jsonArrayFrom(
        eb
          .selectFrom('studyBatch')
          .innerJoin('study', 'study.id', 'studyBatch.studyId')
          .select(['study.code'])
          .whereRef('studyBatch.batchId', '=', 'batch.id')
          .orderBy('study.code'),
      ).as('studies'),
    ])
    .where((eb) =>
      eb.or([
        eb(sql<string>`lower(batch.code)`, 'like', typed),
        eb(sql<string>`lower(formula.name)`, 'like', typed),
      ]),
    )
    .$if(query.state !== 'all', (q) => q.where('batch.state', '=', query.state))
    .orderBy(order[query.sort], (by) =>
      query.order === 'asc' ? by.asc().nullsLast() : by.desc().nullsLast(),
    )
    .orderBy('batch.code')
    .execute()
  return rows.map((row) => ({
    ...row,
    state: row.state as BatchState,
    lines: row.lines ?? 0,
    linesWeighed: row.linesWeighed ?? 0,
  }))
}

export type BatchRow = Awaited<ReturnType<typeof listBatches>>[number]
