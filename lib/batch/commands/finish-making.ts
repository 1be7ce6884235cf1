import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { gramsText } from '../rules/weighing'
import type { FinishMakingInput } from '../schema'
import { assertState, findBatch, staleRow } from './find-batch'

/** Making ends when every line is weighed and every step done; then the batch rests. */
export async function finishMaking(trx: Trx, _actor: Actor, code: string, input: FinishMakingInput) {
  const batch = await findBatch(trx, code)
  assertState(batch, ['making'], 'Its yield is already on record.')
  if (batch.version !== input.version) throw await staleRow(trx, 'batch', batch.id, code)
  const done = await trx
    .selectFrom('batch')
    .select((eb) => [
      eb
        .selectFrom('batchWeighing')
        .select(sql<number>`count(*) filter (where actual_g is null)`.as('count'))
        .whereRef('batchId', '=', 'batch.id')
        .as('toWeigh'),
      eb
        .selectFrom('batchWeighing')
        .select(sql<number>`coalesce(sum(actual_g), 0)`.as('sum'))
        .whereRef('batchId', '=', 'batch.id')
        .as('weighedG'),
      eb
        .selectFrom('batchStep')
        .select(sql<number>`count(*) filter (where done_at is null)`.as('count'))
        .whereRef('batchId', '=', 'batch.id')
        .as('toDo'),
    ])
    .where('batch.id', '=', batch.id)
    .executeTakeFirstOrThrow()
  assertDone(code, done.toWeigh ?? 0, done.toDo ?? 0)
  const weighedG = done.weighedG ?? 0
  if (input.yieldG > weighedG) {
    throw refuse.invalid(
      `${code} cannot yield more than the ${gramsText(weighedG)} g that went in. Weigh it again.`,
      {
        yieldG: `At most the ${gramsText(weighedG)} g that went in.`,
      },
    )
  }
  const { yieldG, fillG, closure, note } = input
  return trx
    .updateTable('batch')
    .set({ state: 'resting', yieldG, fillG, closure, version: input.version + 1 })
    .$if(note !== '', (query) => query.set({ note }))
    .set({ madeAt: sql<string>`app_now()` })
    .where('id', '=', batch.id)
    .returning(['code', 'state', 'version', 'madeAt'])
    .executeTakeFirstOrThrow()
}

function assertDone(code: string, toWeigh: number, toDo: number) {
  if (!toWeigh && !toDo) return
  const missing = [
    toWeigh ? `${toWeigh} ${toWeigh === 1 ? 'line is' : 'lines are'} not weighed` : '',
    toDo ? `${toDo} ${toDo === 1 ? 'step is' : 'steps are'} not done` : '',
  ].filter(Boolean)
  throw refuse.conflict(`${code} is not finished: ${missing.join(', ')}. Log them first.`, { toWeigh, toDo })
}
