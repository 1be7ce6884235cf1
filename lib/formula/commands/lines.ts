import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { FormulaLine, FormulaStep } from '../schema'

// Rows are written several at a time, and a row that did not change is not touched, so that the trail
// shows one row per change and no other.

export async function insertLines(trx: Trx, versionId: string, lines: readonly FormulaLine[]) {
  if (lines.length) await trx.insertInto('formulaLine').values(lineRows(versionId, lines)).execute()
}

export async function insertSteps(trx: Trx, versionId: string, steps: readonly FormulaStep[]) {
  if (steps.length) await trx.insertInto('formulaStep').values(stepRows(versionId, steps)).execute()
}

export async function replaceLines(trx: Trx, versionId: string, lines: readonly FormulaLine[]) {
  const ids = lines.map((line) => line.id)
  await assertOwn(trx, 'formulaLine', versionId, ids)
  await trx
    .deleteFrom('formulaLine')
    .where('formulaVersionId', '=', versionId)
    .$if(ids.length > 0, (query) => query.where('id', 'not in', ids))
    .execute()
  if (!lines.length) return
  // The remainder may move from one line to another, and the index allows one at a time.
  const remainder = lines.find((line) => line.isRemainder)
  await trx
    .updateTable('formulaLine')
    .set({ isRemainder: false })
    .where('formulaVersionId', '=', versionId)
    .where('isRemainder', '=', true)
    .$if(remainder !== undefined, (query) => query.where('id', '!=', remainder?.id ?? ''))
    .execute()
  await trx
    .insertInto('formulaLine')
    .values(lineRows(versionId, lines))
    .onConflict((conflict) =>
      conflict
        .column('id')
        .doUpdateSet((eb) => ({
          position: eb.ref('excluded.position'),
          phase: eb.ref('excluded.phase'),
          ingredientId: eb.ref('excluded.ingredientId'),
          inciName: eb.ref('excluded.inciName'),
          function: eb.ref('excluded.function'),
          percentThousandths: eb.ref('excluded.percentThousandths'),
          density: eb.ref('excluded.density'),
          isInternal: eb.ref('excluded.isInternal'),
          isRemainder: eb.ref('excluded.isRemainder'),
          priceCentsPerKg: eb.ref('excluded.priceCentsPerKg'),
        }))
        .where(sql<boolean>`(formula_line.*) is distinct from (excluded.*)`),
    )
    .execute()
}

export async function replaceSteps(trx: Trx, versionId: string, steps: readonly FormulaStep[]) {
  const ids = steps.map((step) => step.id)
  await assertOwn(trx, 'formulaStep', versionId, ids)
  await trx
    .deleteFrom('formulaStep')
    .where('formulaVersionId', '=', versionId)
    .$if(ids.length > 0, (query) => query.where('id', 'not in', ids))
    .execute()
  if (!steps.length) return
  await trx
    .insertInto('formulaStep')
    .values(stepRows(versionId, steps))
    .onConflict((conflict) =>
      conflict
        .column('id')
        .doUpdateSet((eb) => ({
          position: eb.ref('excluded.position'),
          phase: eb.ref('excluded.phase'),
          instruction: eb.ref('excluded.instruction'),
          speedRpm: eb.ref('excluded.speedRpm'),
          minutes: eb.ref('excluded.minutes'),
          temperatureC: eb.ref('excluded.temperatureC'),
          lookFor: eb.ref('excluded.lookFor'),
          caution: eb.ref('excluded.caution'),
        }))
        .where(sql<boolean>`(formula_step.*) is distinct from (excluded.*)`),
    )
    .execute()
}

export async function assertIngredients(trx: Trx, lines: readonly FormulaLine[]) {
  const wanted = [...new Set(lines.map((line) => line.ingredientId).filter((id) => id !== null))]
  if (!wanted.length) return
  const found = await trx.selectFrom('ingredient').select('id').where('id', 'in', wanted).execute()
  const known = new Set(found.map((row) => row.id))
  const fields = Object.fromEntries(
    lines.flatMap((line, index) =>
      line.ingredientId && !known.has(line.ingredientId)
        ? [[`lines.${index}.inciName`, `${line.inciName} is not among the ingredients. Choose it again.`]]
        : [],
    ),
  )
  if (Object.keys(fields).length) {
    throw refuse.invalid(
      'An ingredient of these lines is not in the list. Choose it again, then save.',
      fields,
    )
  }
}

/** A line's id is made by the client; one that belongs to another version must not be pulled over. */
async function assertOwn(trx: Trx, table: 'formulaLine' | 'formulaStep', versionId: string, ids: string[]) {
  if (!ids.length) return
  const foreign = await trx
    .selectFrom(table)
    .select('id')
    .where('id', 'in', ids)
    .where('formulaVersionId', '!=', versionId)
    .executeTakeFirst()
  if (foreign) throw refuse.conflict('A line belongs to another version of a formula. Load the page again.')
}

function lineRows(formulaVersionId: string, lines: readonly FormulaLine[]) {
  return lines.map((line, position) => ({
    id: line.id,
    formulaVersionId,
    position,
    phase: line.phase,
    ingredientId: line.ingredientId,
    inciName: line.inciName,
    function: line.function,
    percentThousandths: line.percentThousandths,
    density: line.density,
    isInternal: line.isInternal,
    priceCentsPerKg: line.priceCentsPerKg,
    isRemainder: line.isRemainder,
  }))
}

function stepRows(formulaVersionId: string, steps: readonly FormulaStep[]) {
  return steps.map((step, position) => ({ ...step, formulaVersionId, position }))
}
