import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { totalSentence } from '@/lib/formula/rules/finding'
import { wholeThousandths } from '@/lib/formula/rules/totals'
import { refuse } from '@/lib/http/errors'
import { usualWeighingTolerancePercent } from '@/lib/lab/rules'
import type { ProtocolPlan } from '@/lib/protocol/schema'
import { targetGrams } from '../rules/weighing'
import type { CreateBatchInput } from '../schema'

/**
 * A batch of one version of a formula: locks the version, scales the weighing sheet and lays out the steps.
 * The same id again answers with what stands.
 */
export async function createBatch(trx: Trx, actor: Actor, input: CreateBatchInput) {
  const existing = await trx
    .selectFrom('batch')
    .select(['id', 'code', 'formulaVersionId'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (existing) {
    if (existing.formulaVersionId === input.formulaVersionId) return { id: existing.id, code: existing.code }
    throw refuse.conflict(`${existing.code} was made of another version. Make the batch anew.`)
  }
  const formula = await lockFormula(trx, input.formulaVersionId)
  const [lines, steps] = [
    await trx
      .selectFrom('formulaLine')
      .select(['id', 'percentThousandths'])
      .where('formulaVersionId', '=', input.formulaVersionId)
      .where('percentThousandths', '>', 0)
      .orderBy('position')
      .execute(),
    await trx
      .selectFrom('formulaStep')
      .select('id')
      .where('formulaVersionId', '=', input.formulaVersionId)
      .orderBy('position')
      .execute(),
  ]
  assertWhole(formula, lines)
  if (formula.state === 'draft') {
    await trx
      .updateTable('formulaVersion')
      .set((eb) => ({ state: 'locked', version: eb('version', '+', 1) }))
      .where('id', '=', input.formulaVersionId)
      .execute()
  }
  const code = `${formula.code}-${formula.batches + 1}`
  const { id, formulaVersionId, sizeG, note } = input
  const protocol = await narrowestOf(trx, input.protocolVersionIds)
  const usual = formula.labTolerancePercent ?? usualWeighingTolerancePercent
  const tolerancePercent = input.tolerancePercent ?? protocol?.tolerancePercent ?? usual
  await trx
    .insertInto('batch')
    .values({
      ...{ id, code, formulaVersionId, sizeG, tolerancePercent, note, createdBy: actor.personId },
      protocolVersionId: protocol?.id ?? null,
    })
    .execute()
  const weighings = lines.map((line, position) => ({
    id: newId(),
    batchId: id,
    formulaLineId: line.id,
    position,
    targetG: targetGrams(sizeG, line.percentThousandths),
  }))
  await trx.insertInto('batchWeighing').values(weighings).execute()
  if (steps.length) {
    const rows = steps.map((step, position) => ({
      id: newId(),
      batchId: id,
      formulaStepId: step.id,
      position,
    }))
    await trx.insertInto('batchStep').values(rows).execute()
  }
  return { id, code }
}

/** The formula's row is locked first, so that two batches begun at the same moment get two numbers. */
async function lockFormula(trx: Trx, formulaVersionId: string) {
  const row = await trx
    .selectFrom('formula')
    .innerJoin('formulaVersion', 'formulaVersion.formulaId', 'formula.id')
    .select(['formula.id', 'formula.code', 'formulaVersion.number', 'formulaVersion.state'])
    .select(
      sql<number | null>`(select (settings->>'weighingTolerancePercent')::numeric from lab)`.as(
        'labTolerancePercent',
      ),
    )
    .where('formulaVersion.id', '=', formulaVersionId)
    .where('formula.isReference', '=', false)
    .forUpdate()
    .executeTakeFirst()
  if (!row) throw refuse.notFound('That version of the formula is not there. Load the page again.')
  const count = await trx
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .select(sql<number>`coalesce(max(substring(batch.code from '[0-9]+$')::int), 0)`.as('batches'))
    .where('formulaVersion.formulaId', '=', row.id)
    .executeTakeFirstOrThrow()
  return { ...row, batches: count.batches }
}

/** Of the protocols it is sized for the one whose tolerance is narrowest, else the first of them. */
async function narrowestOf(trx: Trx, ids: readonly string[]) {
  if (!ids.length) return null
  const found = await trx
    .selectFrom('protocolVersion')
    .select('id')
    .select((eb) => eb.ref('plan').$castTo<ProtocolPlan>().as('plan'))
    .where('id', 'in', ids)
    .execute()
  const asked = ids.flatMap((id) => {
    const plan = found.find((one) => one.id === id)?.plan
    return plan ? [{ id, tolerancePercent: plan.weighingTolerancePercent ?? null }] : []
  })
  if (asked.length < new Set(ids).size) {
    throw refuse.invalid('A protocol that this batch was sized for is not there. Choose again.', {
      protocolVersionIds: 'Choose protocols of the list.',
    })
  }
  const width = ({ tolerancePercent }: { tolerancePercent: number | null }) => tolerancePercent ?? Infinity
  return asked.toSorted((a, b) => width(a) - width(b) || 0)[0] ?? null
}

function assertWhole(
  formula: { code: string; number: number },
  lines: readonly { percentThousandths: number }[],
) {
  const totalThousandths = lines.reduce((sum, line) => sum + line.percentThousandths, 0)
  if (totalThousandths === wholeThousandths) return
  const said = totalSentence({ totalThousandths, missingThousandths: wholeThousandths - totalThousandths })
  throw refuse.conflict(
    lines.length
      ? `Version ${formula.number} of ${formula.code} does not add up to 100.00 %: ${said}. Correct its lines, then make the batch.`
      : `Version ${formula.number} of ${formula.code} has no lines yet. Write them, then make the batch.`,
  )
}
