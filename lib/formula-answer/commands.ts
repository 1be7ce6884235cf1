import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { formulaChecks, type FormulaCheck } from '@/lib/formula/rules/checks'
import { targetPhOf } from '@/lib/formula/rules/target-ph'
import type { EmulsionType } from '@/lib/formula/schema'
import { refuse } from '@/lib/http/errors'
import { getGround } from './queries'
import type { FormulaAnswerInput } from './schema'

/**
 * Answers a question of a version, or sets it aside, with a note. Kept beside what the question rested on, so that a
 * later change of that opens it again. A locked version is answered as well: its questions do not end with the batch.
 */
export async function answerQuestion(trx: Trx, actor: Actor, code: string, input: FormulaAnswerInput) {
  const version = await trx
    .selectFrom('formulaVersion')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['formula.id as formulaId', 'formula.emulsionType', 'formulaVersion.number'])
    .select(['formulaVersion.targetPhLow', 'formulaVersion.targetPhHigh'])
    .where('formulaVersion.id', '=', input.versionId)
    .where('formula.code', '=', code)
    .forShare()
    .executeTakeFirst()
  if (!version) throw refuse.notFound(`${code} has no such version. Load the page again.`)
  const same = await findSame(trx, input)
  if (same) return same
  const { formulaId, number } = version
  const ground = await getGround(trx, { formulaId, versionId: input.versionId, number })
  const { lines, steps } = await linesAndSteps(trx, input.versionId)
  const type = version.emulsionType as EmulsionType
  const checks = formulaChecks(type, lines, steps, ground, targetPhOf(version))
  const check = checks.find((one) => one.key === input.question)
  refuseUnasked(check, input, `version ${number} of ${code}`)
  const { id, versionId: formulaVersionId, question, kind, note, askedAbout } = input
  await trx
    .insertInto('formulaAnswer')
    .values({ id, formulaVersionId, question, kind, note, askedAbout, answeredBy: actor.personId })
    .execute()
  return { id, question, kind }
}

async function findSame(trx: Trx, input: FormulaAnswerInput) {
  const same = await trx
    .selectFrom('formulaAnswer')
    .select(['id', 'formulaVersionId', 'question', 'kind', 'note'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (!same) return null
  const isSame =
    same.formulaVersionId === input.versionId && same.question === input.question && same.note === input.note
  if (!isSame)
    throw refuse.conflict('This answer was kept already, with other words. Load the page to see it.')
  return { id: same.id, question: same.question, kind: same.kind }
}

/** A version as it is saved. */
async function linesAndSteps(trx: Trx, versionId: string) {
  const lines = await trx
    .selectFrom('formulaLine')
    .select(['id', 'phase', 'ingredientId', 'inciName', 'function', 'percentThousandths', 'density'])
    .select(['isInternal', 'isRemainder'])
    .where('formulaVersionId', '=', versionId)
    .orderBy('position')
    .execute()
  const steps = await trx
    .selectFrom('formulaStep')
    .select(['phase', 'instruction', 'speedRpm', 'minutes', 'temperatureC'])
    .where('formulaVersionId', '=', versionId)
    .orderBy('position')
    .execute()
  return { lines, steps }
}

function refuseUnasked(check: FormulaCheck | undefined, input: FormulaAnswerInput, what: string) {
  if (!check) throw refuse.conflict(`That question is not asked of ${what} any more. Load the page again.`)
  if (check.askedAbout !== input.askedAbout) {
    throw refuse.stale(
      `What "${check.question}" is about has changed in ${what} since you opened it. Your note is still here: load the page again and look, then answer.`,
      { question: check.key, answer: check.answer },
    )
  }
  if (!check.isAsked) {
    throw refuse.conflict(`${what} answers "${check.question}" itself: ${check.answer}`)
  }
}
