import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { restHours } from '../rules/rest'
import type { DecideInput } from '../schema'
import { assertState, findBatch, staleRow } from './find-batch'

/** Released for studies or rejected, both for good. A rejection, and a release before the rest is over, say why. */
export async function decideBatch(trx: Trx, actor: Actor, code: string, input: DecideInput) {
  const batch = await findBatch(trx, code)
  const isRelease = input.decision === 'released'
  assertState(
    batch,
    isRelease ? ['resting'] : ['making', 'resting'],
    isRelease && batch.state === 'making'
      ? 'Weigh its lines, do its steps and give the yield first.'
      : 'That is not decided twice; make a new batch.',
  )
  if (batch.version !== input.version) throw await staleRow(trx, 'batch', batch.id, code)
  if (isRelease && batch.emulsionTypeFound === null) {
    throw refuse.conflict(`${code} has no emulsion-type test yet. Test it, then release it.`)
  }
  if (!isRelease && !input.reason) {
    throw refuse.invalid(`Say why ${code} is rejected.`, { reason: 'Say why it is rejected.' })
  }
  if (isRelease && !input.reason && (batch.restedHours ?? 0) < restHours.least) {
    throw refuse.invalid(
      `${code} has not rested ${restHours.least} h yet. Wait, or say why it is released now.`,
      { reason: 'Say why it is released before the rest is over.' },
    )
  }
  return trx
    .updateTable('batch')
    .set({ state: input.decision, decisionReason: input.reason || null, decidedBy: actor.personId })
    .set({ decidedAt: sql<string>`app_now()`, version: input.version + 1 })
    .where('id', '=', batch.id)
    .returning(['code', 'state', 'version'])
    .executeTakeFirstOrThrow()
}
