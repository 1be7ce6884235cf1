import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { readDecimal } from '@/lib/formula/rules/numbers'
import { refuse } from '@/lib/http/errors'
import { gramsText, tolerancePercent, weighed } from '../rules'
import type { WeighInput } from '../schema'
import { assertState, findBatch, staleRow } from './find-batch'

/** One line's weight. Outside its tolerance it wants a note, corrected it wants a reason; both stay visible. */
export async function weighLine(trx: Trx, actor: Actor, code: string, input: WeighInput) {
  const batch = await findBatch(trx, code)
  assertState(batch, ['making'], 'Its weighing sheet is closed.')
  const line = await trx
    .selectFrom('batchWeighing')
    .innerJoin('formulaLine', 'formulaLine.id', 'batchWeighing.formulaLineId')
    .select([
      'batchWeighing.targetG',
      'batchWeighing.actualG',
      'batchWeighing.version',
      'formulaLine.inciName',
    ])
    .where('batchWeighing.id', '=', input.weighingId)
    .where('batchWeighing.batchId', '=', batch.id)
    .executeTakeFirst()
  if (!line) throw refuse.notFound(`${code} has no such line. Load the page again.`)
  const actualG = readWeight(input.actualTyped)
  if (line.version !== input.version) {
    throw await staleRow(trx, 'batch_weighing', input.weighingId, `the weight of ${line.inciName}`)
  }
  const verdict = weighed(line.targetG, actualG)
  if (!verdict.isWithin && !input.note) {
    throw refuse.invalid(
      `${line.inciName} is ${gramsText(Math.abs(verdict.differenceG))} g ${verdict.differenceG < 0 ? 'short' : 'over'}, more than ${tolerancePercent} %. Say why it is kept.`,
      { note: 'Say why this weight is kept.' },
    )
  }
  if (line.actualG !== null && !input.reason) {
    throw refuse.invalid(`${line.inciName} was weighed already. Say why the weight is corrected.`, {
      reason: 'Say why the weight is corrected.',
    })
  }
  const { lot, balance, note, actualTyped } = input
  const saved = await trx
    .updateTable('batchWeighing')
    .set({ actualG, actualTyped, lot, balance, note, weighedBy: actor.personId })
    .set({ weighedAt: sql<string>`app_now()`, version: input.version + 1 })
    .where('id', '=', input.weighingId)
    .returning(['id', 'version', 'actualG', 'weighedAt'])
    .executeTakeFirstOrThrow()
  return { ...saved, differencePercent: verdict.differencePercent, isWithin: verdict.isWithin }
}

function readWeight(typed: string): number {
  const grams = readDecimal(typed)
  const refused = (sentence: string) => refuse.invalid(sentence, { actualTyped: sentence })
  if (grams === null)
    throw refused(`"${typed.slice(0, 20)}" is not a weight. Type digits with one comma or point.`)
  if (grams <= 0) throw refused('A weight is above 0 g. Tare the vessel and weigh again.')
  if (grams > 1_000_000) throw refused('A line of more than 1 000 kg cannot be right here.')
  return grams
}
