import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { totalGrams } from '@/lib/science/making'
import { currentPortions, gramsText, readWeight, weighed } from '../rules/weighing'
import type { WeighInput } from '../schema'
import { assertState, findBatch, staleRow, whenDone } from './find-batch'
import { doubtOf } from './instrument-doubt'

/**
 * One portion of a line, added to those before it. A correction is a portion that supersedes one and says why; kept
 * outside its tolerance a line wants a note. The same id again answers with what stands.
 */
export async function weighLine(trx: Trx, actor: Actor, code: string, input: WeighInput) {
  const batch = await findBatch(trx, code)
  const line = await findLine(trx, batch.id, input.weighingId)
  if (!line) throw refuse.notFound(`${code} has no such line. Load the page again.`)
  const portions = await listPortions(trx, input.weighingId)
  if (portions.some((portion) => portion.id === input.id)) return standing(line, batch.tolerancePercent)
  assertState(batch, ['making'], 'Its weighing sheet is closed.')
  const weight = readWeight(input.actualTyped, input.tareTyped, input.supersedes !== null)
  if ('sentence' in weight) throw refuse.invalid(weight.sentence, { [weight.field]: weight.sentence })
  if (line.version !== input.version) {
    throw await staleRow(trx, 'batch_weighing', input.weighingId, `the weight of ${line.inciName}`)
  }
  const current = currentPortions(portions)
  assertCorrection(line.inciName, current, input)
  const rest = current.filter((portion) => portion.id !== input.supersedes)
  const totalG = totalGrams([...rest.map((portion) => portion.netG), weight.netG])
  const wasKept = line.actualG !== null
  // A line of which nothing is left is open again.
  const isKept = totalG > 0 && (wasKept || (input.supersedes === null && input.isLast))
  if (isKept) assertExplained(line, totalG, batch.tolerancePercent, input.note)
  const balance = await doubtOf(trx, input.balanceId, ['balance'], 'balanceId')
  const balanceName = balance?.code ?? input.balance
  const weighedAt = whenDone(batch, input)
  await trx
    .insertInto('batchPortion')
    .values({
      id: input.id,
      batchWeighingId: input.weighingId,
      grossTyped: input.actualTyped,
      tareTyped: input.tareTyped,
      netG: weight.netG,
      isLast: isKept,
      lot: input.lot,
      balance: balanceName,
      balanceId: input.balanceId,
      balanceDoubt: balance?.doubt ?? null,
      note: input.note,
      supersedes: input.supersedes,
      reason: input.reason,
      isFromPaper: input.isFromPaper,
      weighedAt,
      recordedAt: batch.now,
      weighedBy: actor.personId,
    })
    .execute()
  const saved = await trx
    .updateTable('batchWeighing')
    .set({
      actualG: isKept ? totalG : null,
      actualTyped: isKept ? input.actualTyped : null,
      lot: together([...rest.map((portion) => portion.lot), input.lot]),
      balance: together([...rest.map((portion) => portion.balance), balanceName]),
      note: input.note,
      weighedBy: actor.personId,
      weighedAt: isKept ? weighedAt : null,
      version: input.version + 1,
    })
    .where('id', '=', input.weighingId)
    .returning(['id', 'version', 'actualG', 'weighedAt', 'targetG'])
    .executeTakeFirstOrThrow()
  return { ...standing(saved, batch.tolerancePercent), totalG }
}

function findLine(trx: Trx, batchId: string, weighingId: string) {
  return trx
    .selectFrom('batchWeighing')
    .innerJoin('formulaLine', 'formulaLine.id', 'batchWeighing.formulaLineId')
    .select(['batchWeighing.id', 'batchWeighing.targetG', 'batchWeighing.actualG', 'batchWeighing.version'])
    .select(['batchWeighing.weighedAt', 'formulaLine.inciName'])
    .where('batchWeighing.id', '=', weighingId)
    .where('batchWeighing.batchId', '=', batchId)
    .executeTakeFirst()
}

function listPortions(trx: Trx, weighingId: string) {
  return trx
    .selectFrom('batchPortion')
    .select(['id', 'netG', 'supersedes', 'lot', 'balance'])
    .where('batchWeighingId', '=', weighingId)
    .orderBy('id')
    .execute()
}

function assertCorrection(name: string, current: readonly { id: string }[], input: WeighInput) {
  if (input.supersedes === null) return
  if (!current.some((portion) => portion.id === input.supersedes)) {
    throw refuse.conflict(
      `That weight of ${name} was corrected already or is not there. Load the page again.`,
    )
  }
  if (!input.reason) {
    throw refuse.invalid(`Say why the weight of ${name} is corrected.`, {
      reason: 'Say why the weight is corrected.',
    })
  }
}

function assertExplained(
  line: { inciName: string; targetG: number },
  totalG: number,
  tolerancePercent: number,
  note: string,
) {
  const { isWithin, differenceG } = weighed(line.targetG, totalG, tolerancePercent)
  if (isWithin || note) return
  const off = `${gramsText(Math.abs(differenceG))} g ${differenceG < 0 ? 'short' : 'over'}`
  throw refuse.invalid(`${line.inciName} is ${off}, more than ${tolerancePercent} %. Say why it is kept.`, {
    note: 'Say why this weight is kept.',
  })
}

const together = (words: readonly string[]) => [...new Set(words.filter(Boolean))].join(', ')

type Standing = {
  id: string
  version: number
  actualG: number | null
  weighedAt: string | null
  targetG: number
}

function standing({ id, version, actualG, weighedAt, targetG }: Standing, tolerancePercent: number) {
  const verdict = actualG === null ? null : weighed(targetG, actualG, tolerancePercent)
  return {
    ...{ id, version, actualG, weighedAt },
    differencePercent: verdict?.differencePercent ?? null,
    isWithin: verdict?.isWithin ?? null,
  }
}
