import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { claimedInstant } from '@/lib/reading/rules/claimed-time'
import type { BatchState, Claimed } from '../schema'

/** The batch's row, locked: its state decides what may follow. */
export async function findBatch(trx: Trx, code: string) {
  const batch = await trx
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'batch.state', 'batch.version', 'batch.madeAt'])
    .select(['batch.emulsionTypeFound', 'formula.emulsionType', 'batch.tolerancePercent', 'batch.createdAt'])
    .select([
      sql<string>`app_now()`.as('now'),
      sql<number | null>`extract(epoch from app_now() - batch.made_at) / 3600`.as('restedHours'),
    ])
    .where('batch.code', '=', code)
    .forUpdate('batch')
    .executeTakeFirst()
  if (!batch) throw refuse.notFound(`There is no batch ${code}. Look for it in the list of batches.`)
  return { ...batch, state: batch.state as BatchState }
}

const words: Record<BatchState, string> = {
  making: 'is still being made',
  resting: 'is made and rests',
  released: 'is released',
  rejected: 'is rejected',
}

export function assertState(batch: { code: string; state: BatchState }, allowed: BatchState[], then: string) {
  if (!allowed.includes(batch.state)) throw refuse.conflict(`${batch.code} ${words[batch.state]}. ${then}`)
}

/** Who wrote a row after the version that was on screen; the trail knows. */
export async function staleRow(
  trx: Trx,
  table: 'batch' | 'batch_weighing' | 'batch_step',
  id: string,
  what: string,
) {
  const change = await trx
    .selectFrom('trail')
    .innerJoin('person', 'person.id', 'trail.actorId')
    .select(['person.name as by', 'person.initials', 'trail.at', 'trail.after'])
    .where('trail.tableName', '=', table)
    .where('trail.rowId', '=', id)
    .orderBy('trail.id', 'desc')
    .executeTakeFirst()
  return refuse.stale(
    `${change?.by ?? 'Someone'} has written ${what} since you opened it. What you typed is still here: look at theirs first.`,
    change,
  )
}

/** When it was done by the server's clock, and whether that is later typing from paper; refused before the batch began. */
export function whenDone(batch: { code: string; now: string; createdAt: string }, claimed: Claimed): string {
  if (claimed.claimedAt === null) return batch.now
  const { claimedAt, deviceNow } = claimed
  const { measuredAt } = claimedInstant({ claimedAt, deviceNow: deviceNow ?? batch.now }, batch.now)
  // The sheet is printed from the batch, so nothing on it is older; a minute is left for clocks that are read.
  if (Date.parse(measuredAt) < Date.parse(batch.createdAt) - 60_000) {
    const sentence = `${batch.code} was begun later than that. Look at the date again.`
    throw refuse.invalid(sentence, { claimedAt: sentence })
  }
  return measuredAt
}
