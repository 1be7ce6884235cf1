import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { CreateFormulaInput } from '../schema'
import { keepFigures } from './figures'
import { assertIngredients, insertLines, insertSteps } from './lines'

/** A formula with its first version, a draft. The same id again answers with what stands. */
export async function createFormula(trx: Trx, actor: Actor, input: CreateFormulaInput) {
  const existing = await trx
    .selectFrom('formula')
    .select(['id', 'code', 'name'])
    .where((eb) => eb.or([eb('id', '=', input.id), eb(sql`lower(code)`, '=', input.code.toLowerCase())]))
    .execute()
  const same = existing.find((row) => row.id === input.id && row.code === input.code)
  if (same) return { id: same.id, code: same.code, versionId: input.versionId, number: 1 }
  const taken = existing[0]
  if (taken) {
    throw refuse.conflict(`The code ${taken.code} belongs to ${taken.name}. Choose another code.`, {
      field: 'code',
      code: taken.code,
    })
  }
  if (input.clientId) await assertClient(trx, input.clientId)
  await assertIngredients(trx, input.lines)
  const { id, versionId, code, name, emulsionType, clientId, note } = input
  await trx
    .insertInto('formula')
    .values({ id, code, name, emulsionType, clientId, createdBy: actor.personId })
    .execute()
  await trx
    .insertInto('formulaVersion')
    .values({
      ...{ id: versionId, formulaId: id, number: 1, note, createdBy: actor.personId },
      ...{ targetPhLow: input.targetPhLow, targetPhHigh: input.targetPhHigh },
    })
    .execute()
  await insertLines(trx, versionId, input.lines)
  await insertSteps(trx, versionId, input.steps)
  await keepFigures(trx, [{ formulaId: id, versionId, lines: input.lines }])
  return { id, code, versionId, number: 1 }
}

async function assertClient(trx: Trx, clientId: string) {
  const client = await trx.selectFrom('client').select('id').where('id', '=', clientId).executeTakeFirst()
  if (!client) {
    throw refuse.invalid('That client is not there any more. Choose one from the list.', {
      clientId: 'Choose a client from the list.',
    })
  }
}
