import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { DoStepInput } from '../schema'
import { assertState, findBatch, staleRow } from './find-batch'

/** What was done in one process step, beside what was prescribed. */
export async function doStep(trx: Trx, actor: Actor, code: string, input: DoStepInput) {
  const batch = await findBatch(trx, code)
  assertState(batch, ['making'], 'Its process is closed.')
  const step = await trx
    .selectFrom('batchStep')
    .select(['position', 'version', 'doneAt'])
    .where('id', '=', input.stepId)
    .where('batchId', '=', batch.id)
    .executeTakeFirst()
  if (!step) throw refuse.notFound(`${code} has no such step. Load the page again.`)
  const what = `step ${step.position + 1}`
  if (step.version !== input.version) throw await staleRow(trx, 'batch_step', input.stepId, what)
  if (step.doneAt !== null && !input.reason) {
    throw refuse.invalid(`${what.replace('s', 'S')} was logged already. Say why it is corrected.`, {
      reason: 'Say why the step is corrected.',
    })
  }
  const { actualSpeedRpm, actualMinutes, actualTemperatureC, note } = input
  return trx
    .updateTable('batchStep')
    .set({ actualSpeedRpm, actualMinutes, actualTemperatureC, note, doneBy: actor.personId })
    .set({ doneAt: sql<string>`app_now()`, version: input.version + 1 })
    .where('id', '=', input.stepId)
    .returning(['id', 'version', 'doneAt'])
    .executeTakeFirstOrThrow()
}
