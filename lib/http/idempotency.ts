import { createHash } from 'node:crypto'
import type { Trx } from '@/lib/db/client'
import { refuse } from './errors'

export type Claim = { actorId: string; key: string; route: string; bodyHash: string }
type Answer = { status: number; json: string }

/**
 * Null: this request is the first and must act. Otherwise the answer that the first one got. A second
 * one that arrives meanwhile waits in the insert until the first has committed or given up.
 */
export async function claimKey(trx: Trx, claim: Claim): Promise<Answer | null> {
  const claimed = await trx
    .insertInto('idempotencyAnswer')
    .values(claim)
    .onConflict((conflict) => conflict.columns(['actorId', 'key']).doNothing())
    .returning('key')
    .executeTakeFirst()
  if (claimed) return null
  const first = await trx
    .selectFrom('idempotencyAnswer')
    .select(['route', 'bodyHash', 'status', 'answer'])
    .where('actorId', '=', claim.actorId)
    .where('key', '=', claim.key)
    .executeTakeFirstOrThrow()
  if (first.route !== claim.route || first.bodyHash !== claim.bodyHash)
    throw refuse.invalid(
      'This key was used for something else before. Send the changed entry with a new Idempotency-Key.',
    )
  return { status: first.status ?? 200, json: first.answer ?? 'null' }
}

export async function keepAnswer(trx: Trx, claim: Claim, answer: Answer): Promise<void> {
  await trx
    .updateTable('idempotencyAnswer')
    .set({ status: answer.status, answer: answer.json })
    .where('actorId', '=', claim.actorId)
    .where('key', '=', claim.key)
    .execute()
}

/** The device's own time is new at each attempt; all else of a repeat must be what it was. */
export function hashBody(text: string): string {
  return createHash('sha256')
    .update(text.replace(/"deviceNow":"[^"\\]*",?/g, ''))
    .digest('hex')
}
