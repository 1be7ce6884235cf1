import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { findDraftChange } from '../queries/last-change'
import type { SaveFormulaInput } from '../schema'
import { keepFigures } from './figures'
import { assertIngredients, replaceLines, replaceSteps } from './lines'

/** Saves a draft as a whole. A locked version and a draft that someone else saved meanwhile are refused. */
export async function saveFormula(trx: Trx, _actor: Actor, code: string, input: SaveFormulaInput) {
  const draft = await trx
    .selectFrom('formulaVersion')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['formula.id as formulaId', 'formula.name', 'formula.emulsionType'])
    .select(['formulaVersion.number', 'formulaVersion.state', 'formulaVersion.version'])
    .where('formulaVersion.id', '=', input.versionId)
    .where('formula.code', '=', code)
    .forUpdate()
    .executeTakeFirst()
  if (!draft) throw refuse.notFound(`${code} has no such version. Load the page again.`)
  if (draft.state === 'locked') {
    throw refuse.conflict(
      `Version ${draft.number} of ${code} is locked because a batch uses it. Make a new version from it.`,
    )
  }
  if (draft.version !== input.version) throw await staleDraft(trx, code, input)
  await assertIngredients(trx, input.lines)
  if (draft.emulsionType !== input.emulsionType) await assertTypeMayChange(trx, code, draft)
  if (draft.name !== input.name || draft.emulsionType !== input.emulsionType) {
    await trx
      .updateTable('formula')
      .set((eb) => ({ name: input.name, emulsionType: input.emulsionType, version: eb('version', '+', 1) }))
      .where('id', '=', draft.formulaId)
      .execute()
  }
  await replaceLines(trx, input.versionId, input.lines)
  await replaceSteps(trx, input.versionId, input.steps)
  await keepFigures(trx, [{ formulaId: draft.formulaId, versionId: input.versionId, lines: input.lines }])
  return trx
    .updateTable('formulaVersion')
    .set({
      ...{ note: input.note, version: input.version + 1 },
      ...{ targetPhLow: input.targetPhLow, targetPhHigh: input.targetPhHigh },
    })
    .where('id', '=', input.versionId)
    .returning(['id as versionId', 'number', 'version'])
    .executeTakeFirstOrThrow()
}

/** The type belongs to the formula, so batches that were made of it hold it. */
async function assertTypeMayChange(
  trx: Trx,
  code: string,
  draft: { formulaId: string; emulsionType: string },
) {
  const made = await trx
    .selectFrom('formulaVersion')
    .select('number')
    .where('formulaId', '=', draft.formulaId)
    .where('state', '=', 'locked')
    .executeTakeFirst()
  if (made) {
    throw refuse.invalid(
      `${code} stays ${draft.emulsionType}, because version ${made.number} was made as a batch. Write a new formula for another type.`,
      { emulsionType: `Batches were made as ${draft.emulsionType}.` },
    )
  }
}

async function staleDraft(trx: Trx, code: string, input: SaveFormulaInput) {
  const change = await findDraftChange(trx, input.versionId, input.version)
  const what = change?.changed.length
    ? ` and changed ${change.changed.slice(0, 4).join(', ')}${change.changed.length > 4 ? ' and more' : ''}`
    : ''
  return refuse.stale(
    `${change?.by ?? 'Someone'} has saved ${code} since you opened it${what}. What you typed is still here: look at theirs, then save yours.`,
    change,
  )
}
