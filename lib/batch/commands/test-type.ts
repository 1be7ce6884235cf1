import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { isTypeAsStated } from '../rules/finding'
import type { TestTypeInput } from '../schema'
import { assertState, findBatch, staleRow } from './find-batch'

/** The emulsion-type test. A result against the formula's type, or a second test, asks for a reason. */
export async function testEmulsionType(trx: Trx, actor: Actor, code: string, input: TestTypeInput) {
  const batch = await findBatch(trx, code)
  assertState(batch, ['resting'], 'The emulsion-type test belongs to the rest after making.')
  if (batch.version !== input.version) throw await staleRow(trx, 'batch', batch.id, code)
  if (!isTypeAsStated(batch.emulsionType, input.found) && !input.reason) {
    throw refuse.invalid(
      `${code} was designed ${batch.emulsionType} and the test says ${input.found}. Test again, or say what you make of it.`,
      { reason: 'Say what you make of it.' },
    )
  }
  if (batch.emulsionTypeFound !== null && !input.reason) {
    throw refuse.invalid(`${code} was tested already. Say why the result is corrected.`, {
      reason: 'Say why the result is corrected.',
    })
  }
  return trx
    .updateTable('batch')
    .set({
      emulsionTypeMethod: input.method,
      emulsionTypeFound: input.found,
      emulsionTypeReason: input.reason || null,
      conductivityUsCm: input.conductivityUsCm,
      testedBy: actor.personId,
      testedAt: sql<string>`app_now()`,
      version: input.version + 1,
    })
    .where('id', '=', batch.id)
    .returning(['code', 'state', 'version', 'emulsionTypeFound'])
    .executeTakeFirstOrThrow()
}
