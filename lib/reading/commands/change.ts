import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { AppError, refuse } from '@/lib/http/errors'
import { torqueDoubt } from '@/lib/science/viscosity'
import { lockStudy, recomputeSeries } from '@/lib/series/commands'
import { loadFrame } from '@/lib/series/queries/frame'
import { seriesUnits } from '@/lib/series/rules/input'
import { sentenceContext } from '@/lib/series/rules/spoken'
import { refuseVoidOfStart, retellFromInitial } from './retell'
import { findReading, type ReadingRow } from '../queries/one'
import { valueDoubts, type EntryDoubt } from '../rules/entry-doubts'
import { conditionKeys } from '../rules/conditions'
import { refuseChange } from '../rules/may-change'
import { ImpossibleEntry, type EntryValue } from '../rules/impossible-entry'
import { valueOf } from '../rules/value'
import type { AttributeKey } from '../schema/attributes'
import type { Correction, Voiding } from '../schema/change'

/** A new reading takes the place of this one; both stay on record, and the reason with them. */
export async function correctReading(trx: Trx, actor: Actor, readingId: string, input: Correction) {
  const reading = await claimReading(trx, actor, readingId, input.id, input.instrumentId ?? null)
  if (reading.newerId === input.id) return { id: input.id, supersedesId: readingId, ...nothingNew }
  refuseChange(actor, reading)
  const read = valueInstead(reading, input)
  if (!input.isConfirmed) await askAboutValue(trx, reading, read)
  await trx
    .insertInto('reading')
    .values({
      ...placeOf(reading, actor),
      id: input.id,
      value: read.value,
      word: read.word,
      typed: input.typed,
      detail: JSON.stringify({ ...keptDetail(reading), ...read.detail }),
      instrumentId: input.instrumentId ?? reading.instrumentId,
      doubts: JSON.stringify(doubtsInstead(reading, read.detail)),
      reason: input.reason,
    })
    .execute()
  await retellFromInitial(trx, actor, reading, input.reason)
  return { id: input.id, supersedesId: readingId, ...(await recompute(trx, actor, reading)) }
}

/** The reading stays on record and counts no more. */
export async function voidReading(trx: Trx, actor: Actor, readingId: string, input: Voiding) {
  const reading = await claimReading(trx, actor, readingId, input.id, null)
  if (reading.newerId === input.id) return { id: input.id, supersedesId: readingId, ...nothingNew }
  refuseChange(actor, reading)
  await refuseVoidOfStart(trx, reading)
  await trx
    .insertInto('reading')
    .values({ ...placeOf(reading, actor), id: input.id, typed: '', isVoid: true, reason: input.reason })
    .execute()
  return { id: input.id, supersedesId: readingId, ...(await recompute(trx, actor, reading)) }
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

function valueInstead(reading: ReadingRow, input: Correction) {
  const attribute = reading.attribute as AttributeKey
  const planned = reading.plan.attributes.find((one) => one.attribute === attribute) ?? null
  try {
    return valueOf(
      { attribute, typed: input.typed, detail: input.detail },
      {
        planned,
        jar: {
          tareG: reading.tareG,
          grossG: reading.grossG,
          fillHeightMm: reading.fillHeightMm ?? reading.plan.fillHeightMm,
        },
        spindles: reading.spindles ?? [],
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

/** What merely looks unlikely is asked about once, as at the first entry. */
async function askAboutValue(trx: Trx, reading: ReadingRow, read: EntryValue): Promise<void> {
  if (reading.studyStationId === null) return
  const frame = await loadFrame(trx, reading.studyId)
  const unit = seriesUnits(frame, new Set([reading.attribute]), []).find(
    (one) => one.batch.id === reading.batchId && one.station.id === reading.studyStationId,
  )
  const own = unit?.jars.find((jar) => jar.ids.includes(reading.id))
  if (!unit || !own) return
  const torquePercent = read.detail['torquePercent']
  const [first] = valueDoubts(
    { ...unit.input, readings: unit.input.readings.filter((other) => other.day !== own.day) },
    {
      time: unit.input.readings.find((other) => other.id === own.id)!.time,
      values: own.rows.map((row) => (row.id === reading.id ? read.value : row.value!)),
      isRepeat: own.rows[0]!.repeatOf !== null,
      ...(typeof torquePercent === 'number' ? { torquePercent } : {}),
    },
    sentenceContext(frame.study, unit.station, unit.attribute),
  )
  if (!first) return
  const { sentence } = first
  throw new AppError(409, 'confirm', `${sentence} Is it so?`, {
    fields: { typed: sentence },
    detail: {
      questions: [{ field: 'typed', attribute: reading.attribute, readingId: reading.id, sentence }],
    },
  })
}

/** How it was come by, where the correction says nothing else: one corrects what was read, not how. */
function keptDetail({ attribute, detail }: ReadingRow): Record<string, unknown> {
  const kept = ['method', 'clock', ...conditionKeys(attribute)]
  return Object.fromEntries(kept.filter((key) => key in detail).map((key) => [key, detail[key]]))
}

/** Conditions stay as they were; the torque is what is typed now. */
function doubtsInstead(reading: ReadingRow, detail: Record<string, unknown>): EntryDoubt[] {
  const kept = reading.doubts.filter(
    ({ reason }) => reason !== 'torque' && reason !== 'jump' && reason !== 'spread',
  )
  const torque = typeof detail['torquePercent'] === 'number' ? torqueDoubt(detail['torquePercent']) : null
  return torque ? [...kept, { reason: 'torque', sentence: `${torque}. Check spindle and speed.` }] : kept
}

const nothingNew = { series: [], raised: [], cleared: [], repeats: [] }

function recompute(trx: Trx, actor: Actor, reading: ReadingRow) {
  return recomputeSeries(trx, actor, reading.studyId, { only: [reading.attribute] })
}
