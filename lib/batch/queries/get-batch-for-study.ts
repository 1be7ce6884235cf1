import { amountsOfVersions } from '@/lib/formula/queries/amounts-of-versions'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { formulaTotals } from '@/lib/formula/rules/totals'
import type { EmulsionType } from '@/lib/formula/schema'
import { refuse } from '@/lib/http/errors'
import type { BatchState, TypeFound } from '../schema'

/** What a study needs to know of the batches that it starts on, in the order of the ids: two statements. */
export async function listBatchesForStudy(db: Db, _actor: Actor, ids: readonly string[]) {
  if (!ids.length) return []
  const rows = await db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select([
      'batch.id',
      'batch.code',
      'batch.formulaVersionId',
      'batch.state',
      'batch.sizeG',
      'batch.yieldG',
      'batch.fillG',
      'batch.closure',
      'batch.madeAt',
      'batch.emulsionTypeMethod',
      'batch.emulsionTypeFound',
      'batch.conductivityUsCm',
      'formula.code as formulaCode',
      'formula.name as formulaName',
      'formula.emulsionType',
      'formula.clientId',
      'formulaVersion.number as versionNumber',
    ])
    .where('batch.id', 'in', ids)
    .execute()
  const amounts = await amountsOfVersions(
    db,
    rows.map((row) => row.formulaVersionId),
  )
  return rows
    .map((row) => {
      const totals = formulaTotals(amounts.get(row.formulaVersionId) ?? [])
      return {
        ...row,
        state: row.state as BatchState,
        emulsionType: row.emulsionType as EmulsionType,
        emulsionTypeFound: row.emulsionTypeFound as TypeFound | null,
        internalVolumePercent: totals.internalVolumePercent,
        isHighInternalPhase: totals.isHighInternalPhase,
      }
    })
    .toSorted((a, b) => ids.indexOf(a.id) - ids.indexOf(b.id))
}

export type BatchForStudy = Awaited<ReturnType<typeof listBatchesForStudy>>[number]

export async function getBatchForStudy(db: Db, actor: Actor, id: string): Promise<BatchForStudy> {
  const [batch] = await listBatchesForStudy(db, actor, [id])
  if (!batch) throw refuse.notFound('That batch is not there. Choose one from the list of batches.')
  return batch
}
