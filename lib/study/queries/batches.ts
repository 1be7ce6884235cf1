import { sql } from 'kysely'
import type { Db } from '@/lib/db/client'
import { gramsOfJars } from '@/lib/science/jar-grams'

/** Batches with the grams that are still free: yield less what earlier studies filled, loss included. */
function batches(db: Db) {
  return db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'batch.state', 'batch.yieldG', 'batch.madeAt'])
    .select(['formula.code as formulaCode', 'formula.name as formulaName', 'formula.emulsionType'])
    .select(['formula.clientId', 'formula.isReference', 'batch.productLot'])
    .select(
      sql<Filled[]>`(
        select coalesce(jsonb_agg(filled), '[]') from (
          select count(*) as "jars", study.fill_g as "fillG", (study.plan->>'lossPercent')::numeric as "lossPercent"
          from jar join study on study.id = jar.study_id where jar.batch_id = batch.id group by study.id
        ) filled
      )`.as('filled'),
    )
}

type Filled = { jars: number; fillG: number; lossPercent: number }

function withTaken<T extends { filled: Filled[] }>(rows: T[]) {
  return rows.map(({ filled, ...batch }) => ({
    ...batch,
    takenG: filled.reduce((sum, f) => sum + gramsOfJars(f.jars, f.fillG, f.lossPercent), 0),
  }))
}

export async function listBatchesForStart(db: Db, ids: string[]) {
  return withTaken(
    await batches(db)
      .where('batch.id', '=', sql<string>`any(${ids}::uuid[])`)
      .execute(),
  )
}

/** What the start of a study offers: released batches, newest first. */
export async function listReleasedBatches(db: Db) {
  return withTaken(
    await batches(db)
      .where('batch.state', '=', 'released')
      .orderBy('batch.madeAt', 'desc')
      .limit(200)
      .execute(),
  )
}
export type ReleasedBatch = Awaited<ReturnType<typeof listReleasedBatches>>[number]
