import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { FlagClosing } from '../schema'
import { claimFlag } from './claim'

/** QA agrees with the answer. */
export async function closeFlag(trx: Trx, actor: Actor, number: number, input: FlagClosing) {
  const flag = await claimFlag(trx, number, input.version)
  if (flag.state !== 'answered') {
    throw refuse.conflict(`Flag ${number} has no answer yet. It is closed once a cause and an action stand.`)
  }
  const { version, state } = await trx
    .updateTable('flag')
    .set({
      state: 'closed',
      closedBy: actor.personId,
      closedAt: flag.now,
      closingNote: input.note,
      version: flag.version + 1,
    })
    .where('id', '=', flag.id)
    .returning(['version', 'state'])
    .executeTakeFirstOrThrow()
  return { number, version, state }
}
