import type { Db, Trx } from '@/lib/db/client'
import { listFactsOfVersion } from '@/lib/ingredient/queries'
import type { BorneBatch, GivenAnswer, Ground } from '@/lib/formula/rules/checks/check'
import { findJoining } from '@/lib/formula/rules/checks/joining'

/** So many batches say what a formula bears; older ones are left out. */
const mostBatches = 30

/** What the questions to a version go by beside its lines and steps: five statements, whatever its size. */
export async function getGround(
  db: Db | Trx,
  { formulaId, versionId, number }: { formulaId: string; versionId: string; number: number },
): Promise<Ground> {
  const [facts, answers, borne] = await Promise.all([
    listFactsOfVersion(db, versionId),
    listAnswers(db, formulaId, number),
    listBorne(db, formulaId),
  ])
  return { facts: Object.fromEntries(facts.map((row) => [row.id, row])), answers, borne }
}

/** Of this version and of those before it: what rests on nothing that changed is answered still. */
async function listAnswers(db: Db | Trx, formulaId: string, upTo: number): Promise<GivenAnswer[]> {
  const rows = await db
    .selectFrom('formulaAnswer')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'formulaAnswer.formulaVersionId')
    .innerJoin('person', 'person.id', 'formulaAnswer.answeredBy')
    .select(['formulaAnswer.question', 'formulaAnswer.kind', 'formulaAnswer.note', 'formulaVersion.number'])
    .select(['formulaAnswer.askedAbout', 'formulaAnswer.answeredAt as at', 'person.initials as by'])
    .where('formulaVersion.formulaId', '=', formulaId)
    .where('formulaVersion.number', '<=', upTo)
    .orderBy('formulaAnswer.answeredAt')
    .orderBy('formulaAnswer.id')
    .execute()
  return rows.map((row) => ({ ...row, kind: row.kind as GivenAnswer['kind'] }))
}

/** Batches of any version that were released, or tested as the type of emulsion they should be. */
async function listBorne(db: Db | Trx, formulaId: string): Promise<BorneBatch[]> {
  const batches = await db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .select(['batch.id', 'batch.code', 'batch.formulaVersionId'])
    .where('formula.id', '=', formulaId)
    .where('batch.state', 'in', ['resting', 'released'])
    .where((eb) =>
      eb.or([
        eb('batch.state', '=', 'released'),
        eb('batch.emulsionTypeFound', '=', eb.ref('formula.emulsionType')),
      ]),
    )
    .orderBy('batch.createdAt', 'desc')
    .limit(mostBatches)
    .execute()
  if (!batches.length) return []
  const [steps, phases] = await Promise.all([
    db
      .selectFrom('batchStep')
      .innerJoin('formulaStep', 'formulaStep.id', 'batchStep.formulaStepId')
      .select(['batchStep.batchId', 'formulaStep.phase', 'formulaStep.instruction'])
      .select((eb) => [
        eb.fn.coalesce('batchStep.actualSpeedRpm', 'formulaStep.speedRpm').as('speedRpm'),
        eb.fn.coalesce('batchStep.actualMinutes', 'formulaStep.minutes').as('minutes'),
        eb.fn.coalesce('batchStep.actualTemperatureC', 'formulaStep.temperatureC').as('temperatureC'),
      ])
      .where(
        'batchStep.batchId',
        'in',
        batches.map((batch) => batch.id),
      )
      .orderBy('batchStep.position')
      .execute(),
    db
      .selectFrom('formulaLine')
      .select(['formulaLine.formulaVersionId', 'formulaLine.phase'])
      .select((eb) => eb.fn.sum<number>('formulaLine.percentThousandths').as('thousandths'))
      .where('formulaLine.formulaVersionId', 'in', [...new Set(batches.map((one) => one.formulaVersionId))])
      .groupBy(['formulaLine.formulaVersionId', 'formulaLine.phase'])
      .execute(),
  ])
  return batches.map((batch) => {
    const own = steps.filter((step) => step.batchId === batch.id)
    const added = findJoining(own)?.added
    const phase = phases.find((one) => one.formulaVersionId === batch.formulaVersionId && one.phase === added)
    return {
      code: batch.code,
      addedPercent: phase ? phase.thousandths / 1000 : null,
      steps: own.map(({ batchId: _, ...step }) => step),
    }
  })
}
