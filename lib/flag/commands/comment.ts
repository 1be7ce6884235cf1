import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { FlagComment } from '../schema'

export async function commentFlag(trx: Trx, actor: Actor, number: number, input: FlagComment) {
  const flag = await trx.selectFrom('flag').select('id').where('number', '=', number).executeTakeFirst()
  if (!flag) throw refuse.notFound('There is no flag with this number.')
  await trx
    .insertInto('flagComment')
    .values({ id: input.id, flagId: flag.id, text: input.text, writtenBy: actor.personId })
    .onConflict((conflict) => conflict.column('id').doNothing())
    .execute()
  return { id: input.id }
}
