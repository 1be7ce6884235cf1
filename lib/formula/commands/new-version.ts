import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import type { NewVersionInput } from '../schema'
import { keepFigures } from './figures'

/** A draft that begins as a copy of another version. One draft at a time, so that nobody works on two. */
export async function newFormulaVersion(trx: Trx, actor: Actor, code: string, input: NewVersionInput) {
  const formula = await trx
    .selectFrom('formula')
    .select('id')
    .where('code', '=', code)
    .where('isReference', '=', false)
    .forUpdate()
    .executeTakeFirst()
  if (!formula) throw refuse.notFound(`There is no formula ${code}. Look for it in the list of formulas.`)
  const versions = await trx
    .selectFrom('formulaVersion')
    .select(['id', 'number', 'state', 'targetPhLow', 'targetPhHigh'])
    .where('formulaId', '=', formula.id)
    .orderBy('number')
    .execute()
  const same = versions.find((version) => version.id === input.id)
  if (same) return { id: same.id, number: same.number }
  const from = versions.find((version) => version.id === input.fromVersionId)
  if (!from) {
    throw refuse.notFound(`${code} has no such version to begin from. Load the page again.`)
  }
  const draft = versions.find((version) => version.state === 'draft')
  if (draft) {
    throw refuse.conflict(
      `Version ${draft.number} of ${code} is still a draft. Go on with it, or make a batch of it first.`,
      { number: draft.number },
    )
  }
  const number = (versions.at(-1)?.number ?? 0) + 1
  await trx
    .insertInto('formulaVersion')
    .values({
      ...{ id: input.id, formulaId: formula.id, number, note: input.note, createdBy: actor.personId },
      ...{ targetPhLow: from.targetPhLow, targetPhHigh: from.targetPhHigh },
    })
    .execute()
  const lines = await copyLines(trx, input.fromVersionId, input.id)
  await copySteps(trx, input.fromVersionId, input.id)
  await keepFigures(trx, [{ formulaId: formula.id, versionId: input.id, lines }])
  return { id: input.id, number }
}

async function copyLines(trx: Trx, from: string, to: string) {
  const lines = await trx
    .selectFrom('formulaLine')
    .select(['position', 'phase', 'ingredientId', 'inciName', 'function', 'percentThousandths', 'density'])
    .select(['isInternal', 'isRemainder', 'priceCentsPerKg'])
    .where('formulaVersionId', '=', from)
    .execute()
  const rows = lines.map((line) => ({ ...line, id: newId(), formulaVersionId: to }))
  if (rows.length) await trx.insertInto('formulaLine').values(rows).execute()
  return lines
}

async function copySteps(trx: Trx, from: string, to: string) {
  const steps = await trx
    .selectFrom('formulaStep')
    .select(['position', 'phase', 'instruction', 'speedRpm', 'minutes', 'temperatureC', 'lookFor', 'caution'])
    .where('formulaVersionId', '=', from)
    .execute()
  if (!steps.length) return
  const rows = steps.map((step) => ({ ...step, id: newId(), formulaVersionId: to }))
  await trx.insertInto('formulaStep').values(rows).execute()
}
