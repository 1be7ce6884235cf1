import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'

/** Batches with the grams that are still free: yield less what earlier studies filled, loss included. */
function batches(db: Db) {
  return db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'batch.state', 'batch.yieldG', 'batch.madeAt'])
    .select(['formula.code as formulaCode', 'formula.name as formulaName', 'formula.emulsionType'])
    .select('formula.clientId')
    .select((eb) =>
      eb.fn
        .coalesce(
          eb
            .selectFrom('jar')
            .innerJoin('study', 'study.id', 'jar.studyId')
            .whereRef('jar.batchId', '=', 'batch.id')
            .select(
              sql<number>`sum(study.fill_g / (1 - (study.plan->>'lossPercent')::numeric / 100))`.as('takenG'),
            ),
          sql<number>`0`,
        )
        .as('takenG'),
    )
}

export async function listBatchesForStart(db: Db, ids: string[]) {
  return batches(db)
    .where('batch.id', '=', sql<string>`any(${ids}::uuid[])`)
    .execute()
}

/** What the start of a study offers: released batches, newest first. */
export async function listReleasedBatches(db: Db) {
  return batches(db)
    .where('batch.state', '=', 'released')
    .orderBy('batch.madeAt', 'desc')
    .limit(200)
    .execute()
}
export type ReleasedBatch = Awaited<ReturnType<typeof listReleasedBatches>>[number]
