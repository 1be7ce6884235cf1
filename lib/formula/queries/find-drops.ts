import type { Db } from '@/lib/db/client'

/** The size of the drops that a batch of this formula was found to have last: its Sauter mean, or the one size typed. */
export async function findDrops(db: Db, formulaId: string) {
  const found = await db
    .selectFrom('batchReading')
    .innerJoin('batch', 'batch.id', 'batchReading.batchId')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .leftJoin('batchReading as corrected', 'corrected.supersedes', 'batchReading.id')
    .select(['batchReading.value as diameterUm', 'batch.code as batchCode'])
    .where('formulaVersion.formulaId', '=', formulaId)
    .where('batchReading.attribute', '=', 'droplets')
    .where('batchReading.moment', '=', 'initial')
    .where('batchReading.value', 'is not', null)
    .where('corrected.id', 'is', null)
    .where('batch.state', '!=', 'rejected')
    .orderBy('batchReading.readAt', 'desc')
    .limit(1)
    .executeTakeFirst()
  return found?.diameterUm ? { diameterUm: found.diameterUm, batchCode: found.batchCode } : null
}

export type DropsFound = NonNullable<Awaited<ReturnType<typeof findDrops>>>
