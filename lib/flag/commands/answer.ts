import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { needsQuality } from '../rules/closing'
import type { FlagAnswer } from '../schema'
import { claimFlag } from './claim'

/** Cause and action. That closes the flag, but for what is out at a station that decides: there QA has the last word. */
export async function answerFlag(trx: Trx, actor: Actor, number: number, input: FlagAnswer) {
  const flag = await claimFlag(trx, number, input.version)
  const isClosed = !needsQuality(flag) || actor.roles.includes('qa')
  const { version, state } = await trx
    .updateTable('flag')
    .set({
      state: isClosed ? 'closed' : 'answered',
      cause: input.cause,
      action: input.action,
      why: input.why,
      answeredBy: actor.personId,
      answeredAt: flag.now,
      ...(isClosed ? { closedBy: actor.personId, closedAt: flag.now } : {}),
      version: flag.version + 1,
    })
    .where('id', '=', flag.id)
    .returning(['version', 'state'])
    .executeTakeFirstOrThrow()
  return { number, version, state }
}
