import { sql } from 'kysely'
import { jsonArrayFrom } from 'kysely/helpers/postgres'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import type { EmulsionType } from '@/lib/formula/schema'
import { refuse } from '@/lib/http/errors'
import { listInstruments } from '@/lib/instrument/queries/list'
import type { BatchState, TypeFound, TypeTestMethod } from '../schema'
import { listBatchReadings, listEntries, listFilledJars, listPortions } from './list-record'

/** A batch with its weighing sheet, process, jars and readings: eight statements, whatever their number. */
export async function getBatch(db: Db, actor: Actor, code: string) {
  const batch = await db
    .selectFrom('batch')
    .innerJoin('formulaVersion', 'formulaVersion.id', 'batch.formulaVersionId')
    .innerJoin('formula', 'formula.id', 'formulaVersion.formulaId')
    .innerJoin('person as maker', 'maker.id', 'batch.createdBy')
    .leftJoin('protocolVersion', 'protocolVersion.id', 'batch.protocolVersionId')
    .leftJoin('protocol', 'protocol.id', 'protocolVersion.protocolId')
    .leftJoin('person as tester', 'tester.id', 'batch.testedBy')
    .leftJoin('person as decider', 'decider.id', 'batch.decidedBy')
    .select([
      'batch.id',
      'batch.code',
      'batch.sizeG',
      'batch.tolerancePercent',
      'batch.state',
      'batch.madeAt',
      'batch.yieldG',
      'batch.fillG',
      'batch.closure',
      'batch.productLot',
      'formula.isReference',
      'batch.emulsionTypeMethod',
      'batch.emulsionTypeFound',
      'batch.emulsionTypeReason',
      'batch.conductivityUsCm',
      'batch.testedAt',
      'tester.initials as testedBy',
      'batch.decisionReason',
      'batch.decidedAt',
      'decider.initials as decidedBy',
      'batch.note',
      'batch.version',
      'batch.createdAt',
      'maker.initials as createdBy',
      'formula.code as formulaCode',
      'formula.name as formulaName',
      'formula.emulsionType',
      'formulaVersion.number as versionNumber',
      'protocol.code as protocolCode',
      'protocol.name as protocolName',
      sql<number | null>`(protocol_version.plan->>'weighingTolerancePercent')::numeric`.as(
        'protocolTolerancePercent',
      ),
      sql<number | null>`extract(epoch from app_now() - batch.made_at) / 3600`.as('restedHours'),
      sql<string>`(app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date::text`.as(
        'today',
      ),
    ])
    .select((eb) =>
      jsonArrayFrom(
        eb
          .selectFrom('batchPhoto')
          .innerJoin('person', 'person.id', 'batchPhoto.takenBy')
          .select(['batchPhoto.id', 'batchPhoto.note', 'batchPhoto.takenAt as at', 'person.initials as by'])
          .whereRef('batchPhoto.batchId', '=', 'batch.id')
          .orderBy('batchPhoto.takenAt'),
      ).as('photos'),
    )
    .where('batch.code', '=', code)
    .executeTakeFirst()
  if (!batch) throw refuse.notFound(`There is no batch ${code}. Look for it in the list of batches.`)
  const [lines, portions, steps, entries, jars, readings, instruments] = await Promise.all([
    listWeighings(db, batch.id),
    listPortions(db, batch.id),
    listSteps(db, batch.id),
    listEntries(db, batch.id),
    listFilledJars(db, batch.id),
    listBatchReadings(db, [batch.id]),
    listInstruments(db, actor),
  ])
  return {
    ...batch,
    state: batch.state as BatchState,
    emulsionType: batch.emulsionType as EmulsionType,
    emulsionTypeMethod: batch.emulsionTypeMethod as TypeTestMethod | null,
    emulsionTypeFound: batch.emulsionTypeFound as TypeFound | null,
    weighings: lines.map((line) => ({
      ...line,
      portions: portions.filter((portion) => portion.weighingId === line.id),
    })),
    steps: steps.map((step) => ({ ...step, entries: entries.filter((entry) => entry.stepId === step.id) })),
    jars,
    readings,
    instruments: instruments.filter((instrument) => instrument.isActive),
  }
}

export type BatchPage = Awaited<ReturnType<typeof getBatch>>

function listWeighings(db: Db, batchId: string) {
  return db
    .selectFrom('batchWeighing')
    .innerJoin('formulaLine', 'formulaLine.id', 'batchWeighing.formulaLineId')
    .leftJoin('ingredient', 'ingredient.id', 'formulaLine.ingredientId')
    .leftJoin('person', 'person.id', 'batchWeighing.weighedBy')
    .select([
      'batchWeighing.id',
      'batchWeighing.targetG',
      'batchWeighing.actualG',
      'batchWeighing.actualTyped',
      'batchWeighing.lot',
      'batchWeighing.balance',
      'batchWeighing.note',
      'batchWeighing.version',
      'batchWeighing.weighedAt',
      'person.initials as weighedBy',
      'formulaLine.phase',
      'formulaLine.inciName',
      'formulaLine.function',
      'formulaLine.percentThousandths',
      'formulaLine.density',
      'formulaLine.isInternal',
      'ingredient.caution',
    ])
    .where('batchWeighing.batchId', '=', batchId)
    .orderBy('batchWeighing.position')
    .execute()
}

function listSteps(db: Db, batchId: string) {
  return db
    .selectFrom('batchStep')
    .innerJoin('formulaStep', 'formulaStep.id', 'batchStep.formulaStepId')
    .leftJoin('person', 'person.id', 'batchStep.doneBy')
    .select([
      'batchStep.id',
      'batchStep.actualSpeedRpm',
      'batchStep.actualMinutes',
      'batchStep.actualTemperatureC',
      'batchStep.note',
      'batchStep.version',
      'batchStep.doneAt',
      'person.initials as doneBy',
      'formulaStep.phase',
      'formulaStep.instruction',
      'formulaStep.speedRpm',
      'formulaStep.minutes',
      'formulaStep.temperatureC',
      'formulaStep.lookFor',
      'formulaStep.caution',
    ])
    .where('batchStep.batchId', '=', batchId)
    .orderBy('batchStep.position')
    .execute()
}
