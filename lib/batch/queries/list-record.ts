import type { Db } from '@/lib/db/client'
import type { KeptDetail } from '../rules/readings'
import type { BatchAttribute, ReadingMoment } from '../schema'

/** Every portion of a batch's lines, corrected ones too, in the order in which they were kept. */
export function listPortions(db: Db, batchId: string) {
  return db
    .selectFrom('batchPortion')
    .innerJoin('batchWeighing', 'batchWeighing.id', 'batchPortion.batchWeighingId')
    .innerJoin('person', 'person.id', 'batchPortion.weighedBy')
    .select([
      'batchPortion.id',
      'batchPortion.batchWeighingId as weighingId',
      'batchPortion.grossTyped',
      'batchPortion.tareTyped',
      'batchPortion.netG',
      'batchPortion.isLast',
      'batchPortion.lot',
      'batchPortion.balance',
      'batchPortion.balanceDoubt',
      'batchPortion.note',
      'batchPortion.supersedes',
      'batchPortion.reason',
      'batchPortion.isFromPaper',
      'batchPortion.weighedAt',
      'batchPortion.recordedAt',
      'person.initials as by',
    ])
    .where('batchWeighing.batchId', '=', batchId)
    .orderBy('batchPortion.recordedAt')
    .orderBy('batchPortion.id')
    .execute()
}

export type Portion = Awaited<ReturnType<typeof listPortions>>[number]

/** Every press at a batch's steps in the order of what happened. */
export function listEntries(db: Db, batchId: string) {
  return db
    .selectFrom('batchStepEntry')
    .innerJoin('batchStep', 'batchStep.id', 'batchStepEntry.batchStepId')
    .innerJoin('person', 'person.id', 'batchStepEntry.recordedBy')
    .select([
      'batchStepEntry.id',
      'batchStepEntry.batchStepId as stepId',
      'batchStepEntry.kind',
      'batchStepEntry.actualSpeedRpm',
      'batchStepEntry.actualMinutes',
      'batchStepEntry.actualTemperatureC',
      'batchStepEntry.note',
      'batchStepEntry.reason',
      'batchStepEntry.isFromPaper',
      'batchStepEntry.happenedAt',
      'batchStepEntry.recordedAt',
      'person.initials as by',
    ])
    .where('batchStep.batchId', '=', batchId)
    .orderBy('batchStepEntry.recordedAt')
    .orderBy('batchStepEntry.id')
    .execute()
}

export type StepEntry = Awaited<ReturnType<typeof listEntries>>[number]

export function listFilledJars(db: Db, batchId: string) {
  return db
    .selectFrom('batchJar')
    .innerJoin('person', 'person.id', 'batchJar.filledBy')
    .select([
      'batchJar.id',
      'batchJar.number',
      'batchJar.tareG',
      'batchJar.grossG',
      'batchJar.torqueNm',
      'batchJar.note',
      'batchJar.supersedes',
      'batchJar.reason',
      'batchJar.isFromPaper',
      'batchJar.filledAt',
      'person.initials as by',
    ])
    .where('batchJar.batchId', '=', batchId)
    .orderBy('batchJar.number')
    .orderBy('batchJar.recordedAt')
    .execute()
}

export type FilledJar = Awaited<ReturnType<typeof listFilledJars>>[number]

/** What was read of batches themselves, corrected readings too; a study offers those of the initial at its start. */
export async function listBatchReadings(db: Db, batchIds: readonly string[]) {
  const rows = await db
    .selectFrom('batchReading')
    .innerJoin('person', 'person.id', 'batchReading.readBy')
    .leftJoin('instrument', 'instrument.id', 'batchReading.instrumentId')
    .select([
      'batchReading.id',
      'batchReading.batchId',
      'batchReading.moment',
      'batchReading.attribute',
      'batchReading.replicate',
      'batchReading.typed',
      'batchReading.value',
      'batchReading.instrumentId',
      'instrument.code as instrument',
      'batchReading.instrumentDoubt',
      'batchReading.note',
      'batchReading.supersedes',
      'batchReading.reason',
      'batchReading.isFromPaper',
      'batchReading.readAt',
      'person.initials as by',
    ])
    .select((eb) => eb.ref('batchReading.detail').$castTo<KeptDetail>().as('detail'))
    .where('batchReading.batchId', 'in', batchIds)
    .orderBy('batchReading.attribute')
    .orderBy('batchReading.replicate')
    .orderBy('batchReading.recordedAt')
    .execute()
  return rows.map((row) => ({
    ...row,
    moment: row.moment as ReadingMoment,
    attribute: row.attribute as BatchAttribute,
  }))
}

export type BatchReading = Awaited<ReturnType<typeof listBatchReadings>>[number]
