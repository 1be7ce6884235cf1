import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { readOnPhotos } from '@/lib/photo/queries/of-jar'
import { pulledFor } from '@/lib/protocol/rules/plan'
import { askAgain } from '@/lib/pull/commands/ask-again'
import { takeUnwantedBack } from '@/lib/pull/commands/take-repeats-back'
import { lockStudy, recomputeSeries, type Recomputed } from '@/lib/series/commands'
import { inSentence } from '@/lib/study/rules/finding'
import { judgeInstead } from './judge-instead'
import { refuseVoidOfStart, retellFromInitial } from './retell'
import { findReading, type ReadingRow } from '../queries/one'
import { ImpossibleEntry } from '../rules/impossible-entry'
import { askInstead, doubtsInstead, keptConditions, keptNotes } from '../rules/instead'
import { refuseChange } from '../rules/may-change'
import { wrongInstrument } from '../rules/instrument-kind'
import { valueOf } from '../rules/value'
import { attributeName, type AttributeKey } from '../schema/attributes'
import type { Correction, Voiding } from '../schema/change'

/** A new reading takes the place of this one; both stay on record, and the reason with them. */
export async function correctReading(trx: Trx, actor: Actor, readingId: string, input: Correction) {
  const reading = await claimReading(trx, actor, readingId, input.id, input.instrumentId ?? null)
  if (reading.newerId === input.id) return { id: input.id, supersedesId: readingId, ...nothingNew }
  refuseChange(actor, reading)
  await refusePhotoOfOther(trx, reading, input)
  if (input.instrumentId) refuseWrongInstrument(reading)
  const read = valueInstead(reading, input)
  const ofValue = await judgeInstead(trx, reading, read)
  if (!input.isConfirmed) askInstead(reading, ofValue)
  const detail = { ...keptNotes(reading), ...read.detail }
  const stands = await standsOnStart(trx, reading)
  await trx
    .insertInto('reading')
    .values({
      ...placeOf(reading, actor),
      id: input.id,
      value: read.value,
      word: read.word,
      typed: input.typed,
      detail: JSON.stringify(detail),
      instrumentId: input.instrumentId ?? reading.instrumentId,
      doubts: JSON.stringify(doubtsInstead(reading, detail, ofValue)),
      reason: input.reason,
    })
    .execute()
  await retellFromInitial(trx, actor, reading, input.reason)
  const recomputed = await recompute(trx, actor, reading)
  if (stands && !isTold(reading, recomputed)) {
    const sentence = `With ${input.typed} at the start, ${attributeName(reading.attribute)} has no band to stand in, so nothing could be said of it any more. Check the number.`
    throw refuse.invalid(sentence, { typed: sentence })
  }
  return { id: input.id, supersedesId: readingId, ...recomputed }
}

/** The reading stays on record and counts no more; on the day it was read the jar asks for it again. */
export async function voidReading(trx: Trx, actor: Actor, readingId: string, input: Voiding) {
  const reading = await claimReading(trx, actor, readingId, input.id, null)
  if (reading.newerId === input.id) return { id: input.id, supersedesId: readingId, ...nothingNew }
  refuseChange(actor, reading)
  await refuseVoidOfStart(trx, reading)
  const stands = await standsOnStart(trx, reading)
  await trx
    .insertInto('reading')
    .values({ ...placeOf(reading, actor), id: input.id, typed: '', isVoid: true, reason: input.reason })
    .execute()
  const recomputed = await recompute(trx, actor, reading)
  if (stands && !isTold(reading, recomputed)) {
    throw refuse.conflict(
      `This is the only initial of ${inSentence(reading.attribute)}, and all that is said of it since rests on it. Correct it instead.`,
    )
  }
  if (reading.pullJarId) await askAgain(trx, reading.pullJarId, reading.attribute)
  return { id: input.id, supersedesId: readingId, ...recomputed }
}

/** Looked up, its study locked, and looked up again: what another did while we waited is then seen. */
async function claimReading(trx: Trx, actor: Actor, id: string, newId: string, instrumentId: string | null) {
  const found = await findReading(trx, id)
  if (!found) throw refuse.notFound('There is no such reading.')
  await lockStudy(trx, found.studyId)
  const reading = (await findReading(trx, id, instrumentId))!
  if (reading.newerId === newId && reading.changerName !== actor.name) {
    throw refuse.conflict('Another entry has this id. Reload, then correct it anew.')
  }
  return reading
}

function placeOf(reading: ReadingRow, actor: Actor) {
  return {
    studyId: reading.studyId,
    batchId: reading.batchId,
    studyStationId: reading.studyStationId,
    pullJarId: reading.pullJarId,
    jarId: reading.jarId,
    attribute: reading.attribute,
    replicate: reading.replicate,
    supersedesId: reading.id,
    // What was measured then is read anew now; it was not measured again.
    measuredAt: reading.measuredAt,
    claimedAt: reading.claimedAt,
    recordedBy: actor.personId,
  }
}

function refuseWrongInstrument({ attribute, instruments }: ReadingRow) {
  const [instrument] = instruments
  const wrong =
    instrument && wrongInstrument({ attribute, label: attributeName(attribute as AttributeKey) }, instrument)
  if (wrong) throw refuse.invalid(wrong, { instrumentId: wrong })
}

function valueInstead(reading: ReadingRow, input: Correction) {
  const attribute = reading.attribute as AttributeKey
  const planned = reading.plan.attributes.find((one) => one.attribute === attribute) ?? null
  try {
    return valueOf(
      { attribute, typed: input.typed, detail: { ...keptConditions(reading), ...input.detail } },
      {
        planned,
        jar: {
          tareG: reading.tareG,
          grossG: reading.grossG,
          fillHeightMm: reading.fillHeightMm ?? reading.plan.fillHeightMm,
        },
        spindles: reading.instruments[0]?.spindles ?? [],
        last: reading.value,
        initial: reading.studyStationId === null ? 'self' : reading.initialDetail,
        emulsionType: reading.emulsionType,
      },
    )
  } catch (error) {
    if (!(error instanceof ImpossibleEntry)) throw error
    throw refuse.invalid(error.sentence, { [error.field]: error.sentence })
  }
}

const nothingNew = { series: [], raised: [], cleared: [], repeats: [] }

async function recompute(trx: Trx, actor: Actor, reading: ReadingRow) {
  const recomputed = await recomputeSeries(trx, actor, reading.studyId, { only: [reading.attribute] })
  // A spare jar that the slip had called for is left alone.
  if (reading.pullJarId) await takeUnwantedBack(trx, reading.pullJarId, reading.attribute)
  return recomputed
}

/** Whether series of this batch are told from this initial. */
async function standsOnStart(trx: Trx, reading: ReadingRow): Promise<boolean> {
  const isAsked = pulledFor(reading.plan).some((planned) => planned.attribute === reading.attribute)
  if (reading.studyStationId !== null || !isAsked) return false
  const series = await trx
    .selectFrom('series')
    .select('id')
    .where('studyId', '=', reading.studyId)
    .where('batchId', '=', reading.batchId)
    .where('attribute', '=', reading.attribute)
    .limit(1)
    .executeTakeFirst()
  return series !== undefined
}

function isTold(reading: ReadingRow, { series }: Recomputed): boolean {
  return series.some((one) => one.batchId === reading.batchId)
}

async function refusePhotoOfOther(
  trx: Trx,
  { pullJarId }: ReadingRow,
  { detail }: Correction,
): Promise<void> {
  if (pullJarId && detail.photoLines) await readOnPhotos(trx, pullJarId, [{ detail }], () => '')
}
