import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { changedInstrument, newInstrument } from '@/lib/instrument/schema'
import { expectOne } from '@/lib/trail/queries'

export async function createInstrument(trx: Trx, _actor: Actor, input: z.output<typeof newInstrument>) {
  const same = await trx.selectFrom('instrument').select('id').where('id', '=', input.id).executeTakeFirst()
  if (same) return same
  await refuseTakenCode(trx, input)
  await trx
    .insertInto('instrument')
    .values({ ...input, ...asJson(input) })
    .execute()
  return { id: input.id }
}

export async function changeInstrument(
  trx: Trx,
  _actor: Actor,
  id: string,
  { version, ...fields }: z.output<typeof changedInstrument>,
) {
  const instrument = await trx
    .selectFrom('instrument')
    .selectAll()
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst()
  if (!instrument) throw refuse.notFound()
  if (instrument.version !== version)
    await expectOne(trx, undefined, { table: 'instrument', id, thing: instrument.code })
  if (instrument.kind !== fields.kind) {
    throw refuse.conflict(
      `${instrument.code} stays a ${instrument.kind}: its calibrations belong to that kind.`,
    )
  }
  await refuseTakenCode(trx, { id, code: fields.code })
  await trx
    .updateTable('instrument')
    .set({ ...fields, ...asJson(fields), version: version + 1 })
    .where('id', '=', id)
    .execute()
  return { version: version + 1 }
}

function asJson({ spindles, dailyCheck }: { spindles: unknown; dailyCheck: unknown }) {
  return { spindles: JSON.stringify(spindles), dailyCheck: dailyCheck ? JSON.stringify(dailyCheck) : null }
}

async function refuseTakenCode(trx: Trx, { id, code }: { id: string; code: string }) {
  const taken = await trx
    .selectFrom('instrument')
    .select('id')
    .where('code', '=', code)
    .where('id', '!=', id)
    .executeTakeFirst()
  if (taken) {
    throw refuse.invalid(`There is already an instrument ${code}. Give this one another code.`, {
      code: 'This code is taken.',
    })
  }
}
