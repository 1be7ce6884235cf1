import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { Received } from '@/lib/http/upload'
import { keepWhole } from '@/lib/photo/commands/keep-whole'
import { originalKey } from '@/lib/photo/rules/keys'
import { getStudyHead, listStudyBatches } from '@/lib/study/queries/head'
import type { OutsideFields } from './schema'

/** The document is stored whole under its hash before the row names it. Sending it twice keeps one. */
export async function addOutsideResult(
  trx: Trx,
  actor: Actor,
  studyCode: string,
  file: Received,
  fields: OutsideFields,
) {
  const study = await getStudyHead(trx, actor, studyCode)
  const known = await trx
    .selectFrom('outsideResult')
    .select(['sha256', 'studyId'])
    .where('id', '=', fields.id)
    .executeTakeFirst()
  if (known) {
    if (known.sha256 === file.sha256 && known.studyId === study.id) return { id: fields.id }
    throw refuse.conflict('Another result was sent under this id. Send this one anew.')
  }
  const batches = await listStudyBatches(trx, study.id)
  const batch = fields.batch === undefined ? null : batches.find((one) => one.code === fields.batch)
  if (batch === undefined) {
    throw refuse.invalid(`${study.code} has no batch ${fields.batch}. Choose one of its own.`, {
      batch: 'Choose a batch of this study.',
    })
  }
  if (fields.reportedOn > study.today) {
    throw refuse.invalid('A report cannot be of a day to come. Give the day that it carries.', {
      reportedOn: 'This day is still to come.',
    })
  }
  if (fields.supersedesId) await refuseWrongOld(trx, study.id, fields.supersedesId)
  await keepWhole(trx, originalKey(file.sha256), file.path, file.type)
  await trx
    .insertInto('outsideResult')
    .values({
      id: fields.id,
      studyId: study.id,
      batchId: batch?.id ?? null,
      timeWeeks: fields.weeks ?? null,
      what: fields.what,
      test: fields.test,
      outcome: fields.outcome,
      value: fields.value,
      labName: fields.labName,
      reportNumber: fields.reportNumber,
      reportedOn: fields.reportedOn,
      note: fields.note,
      supersedesId: fields.supersedesId ?? null,
      reason: fields.supersedesId ? fields.reason : null,
      sha256: file.sha256,
      bytes: file.bytes,
      type: file.type,
      originalName: file.originalName,
      recordedBy: actor.personId,
    })
    .execute()
  return { id: fields.id }
}

async function refuseWrongOld(trx: Trx, studyId: string, id: string): Promise<void> {
  const old = await trx
    .selectFrom('outsideResult as old')
    .leftJoin('outsideResult as newer', 'newer.supersedesId', 'old.id')
    .select(['old.studyId', 'newer.id as newerId'])
    .where('old.id', '=', id)
    .executeTakeFirst()
  if (old?.studyId !== studyId) throw refuse.notFound('There is no such result in this study.')
  if (old.newerId)
    throw refuse.conflict('This result is corrected already. Reload, then correct the newer one.')
}
