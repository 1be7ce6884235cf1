import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { expectOne } from '@/lib/trail/queries'
import type { changedLot, newLot } from './schema'

export async function keepLot(trx: Trx, actor: Actor, input: z.output<typeof newLot>) {
  const same = await trx.selectFrom('lot').select('id').where('id', '=', input.id).executeTakeFirst()
  if (same) return same
  const { numInsertedOrUpdatedRows } = await trx
    .insertInto('lot')
    .values({ ...input, certificate: JSON.stringify(input.certificate), recordedBy: actor.personId })
    .onConflict((conflict) => conflict.doNothing())
    .executeTakeFirst()
  if (!numInsertedOrUpdatedRows) {
    throw refuse.invalid(`Lot ${input.lot} of ${input.name} is in the list already.`, {
      lot: 'This lot is there already.',
    })
  }
  return { id: input.id }
}

/** Opened, or used up. What its certificate says stays as it was entered. */
export async function changeLot(
  trx: Trx,
  _actor: Actor,
  id: string,
  { version, ...fields }: z.output<typeof changedLot>,
) {
  const lot = await trx
    .selectFrom('lot')
    .select(['name', 'version'])
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst()
  if (!lot) throw refuse.notFound()
  if (lot.version !== version) await expectOne(trx, undefined, { table: 'lot', id, thing: lot.name })
  await trx
    .updateTable('lot')
    .set({ ...fields, version: version + 1 })
    .where('id', '=', id)
    .execute()
  return { version: version + 1 }
}
