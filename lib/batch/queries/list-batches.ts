import { sql, type SqlBool } from 'kysely'
import { jsonArrayFrom } from 'kysely/helpers/postgres'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { listChoices } from '@/lib/list/queries/choices'
import { pageOf } from '@/lib/list/queries/page'
import { likeTyped, naturally, onDays, type Source } from '@/lib/list/queries/source'
import type { ListQuery } from '@/lib/list/schema'
import type { BatchState } from '../schema'

type Query = ListQuery<'state' | 'type' | 'client' | 'by' | 'from' | 'to'>

/** One page of the batches and how many stand at each state, whatever is searched for. */
export async function listBatches(db: Db, actor: Actor, query: Query) {
  const page = await pageOf(db, batchSource(db, actor, query), query)
  return { ...page, counts: await countStates(db), choices: await listChoices(db, actor) }
}

export type BatchesPage = Awaited<ReturnType<typeof listBatches>>

export function batchSource(db: Db, _actor: Actor, { q, filters }: Query): Source<BatchRow> {
  const { state, type, client, by, from, to } = filters
  const typed = likeTyped(q)
  const made = sql`coalesce(batch.made_at, batch.created_at)`
  return {
    from: sql`batch join formula_version on formula_version.id = batch.formula_version_id
      join formula on formula.id = formula_version.formula_id join person on person.id = batch.created_by
      left join client on client.id = formula.client_id`,
    where: [
      ...(q
        ? [
            sql<SqlBool>`(batch.code ilike ${typed} or formula.code ilike ${typed} or formula.name ilike ${typed})`,
          ]
        : []),
      ...(state ? [sql<SqlBool>`batch.state = ${state}`] : []),
      ...(type ? [sql<SqlBool>`formula.emulsion_type = ${type}`] : []),
      ...(client ? [sql<SqlBool>`client.name = ${client}`] : []),
      ...(by ? [sql<SqlBool>`person.name = ${by}`] : []),
      ...onDays(made, from, to),
    ],
    id: sql`batch.id`,
    idKind: 'uuid',
    sorts: {
      code: naturally('batch.code'),
      formula: naturally('formula.name'),
      size: { by: sql`batch.size_g`, kind: 'number' },
      yield: { by: sql`batch.yield_g`, kind: 'number' },
      made: { by: made, kind: 'instant' },
      state: { by: sql`batch.state`, kind: 'text' },
      type: { by: sql`formula.emulsion_type`, kind: 'text' },
      client: naturally('client.name'),
      by: naturally('person.name'),
      begun: { by: sql`batch.created_at`, kind: 'instant' },
    },
    rows: (ids) => batchRows(db, ids),
    idOf: (row) => row.id,
  }
}

async function batchRows(db: Db, ids: string[]) {
  const rows = await db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .innerJoin('person', 'person.id', 'batch.createdBy')
    .leftJoin('client', 'client.id', 'formula.clientId')
    .select((eb) => [
      'batch.id',
      'batch.code',
      'batch.sizeG',
      'batch.yieldG',
      'batch.state',
      'batch.madeAt',
      'batch.createdAt',
      'batch.emulsionTypeFound',
      'batch.productLot',
      'formula.isReference',
      'formula.code as formulaCode',
      'formula.name as formulaName',
      'formula.emulsionType',
      'formulaVersion.number as versionNumber',
      'person.initials as createdBy',
      'person.name as createdByName',
      'client.name as clientName',
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
    .where(sql<SqlBool>`batch.id = any(${ids}::uuid[])`)
    .execute()
  return rows.map((row) => ({
    ...row,
    state: row.state as BatchState,
    lines: row.lines ?? 0,
    linesWeighed: row.linesWeighed ?? 0,
  }))
}

export type BatchRow = Awaited<ReturnType<typeof batchRows>>[number]

async function countStates(db: Db): Promise<Record<BatchState, number>> {
  const rows = await db
    .selectFrom('batch')
    .select((eb) => ['state', eb.fn.countAll<number>().as('count')])
    .groupBy('state')
    .execute()
  const of = (state: BatchState) => rows.find((row) => row.state === state)?.count ?? 0
  return { making: of('making'), resting: of('resting'), released: of('released'), rejected: of('rejected') }
}
