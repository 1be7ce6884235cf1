import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { loadFrame, type FrameReading } from '@/lib/series/queries/frame'
import { startOf } from '@/lib/series/rules/input'
import { counted } from '@/lib/study/rules/words'
import type { ReadingRow } from '../queries/one'
import { valueOf } from '../rules/value'
import { attributeOf, type AttributeKey } from '../schema/attributes'
import type { EntryDetail } from '../schema/entry'

/** Kinds whose value is kept as the difference from the initial; every other rests on it through the band alone. */
const toldApart: ReadonlySet<string> = new Set(['colour', 'type'])

/**
 * The initial was corrected: what was told from it is told anew. A reading never changes, so each of them is superseded
 * by one of the same text with the new difference, and both stay on record.
 */
export async function retellFromInitial(trx: Trx, actor: Actor, initial: ReadingRow, reason: string) {
  const rest = await restingOn(trx, initial)
  for (const row of rest.readings) {
    const read = valueOf(
      { attribute: row.attribute as AttributeKey, typed: row.typed, detail: row.detail as EntryDetail },
      {
        planned: initial.plan.attributes.find((one) => one.attribute === row.attribute) ?? null,
        jar: { tareG: null, grossG: null, fillHeightMm: null },
        spindles: [],
        last: null,
        ...{ initial: rest.start.initial, emulsionType: rest.start.emulsionType },
      },
    )
    const isSame = read.value === row.value && JSON.stringify(read.detail) === JSON.stringify(row.detail)
    if (isSame) continue
    await trx
      .insertInto('reading')
      .values({
        ...{ id: newId(), studyId: initial.studyId, batchId: row.batchId, attribute: row.attribute },
        ...{ studyStationId: row.studyStationId, pullJarId: row.pullJarId, jarId: row.jarId },
        ...{ replicate: row.replicate, typed: row.typed, value: read.value, word: read.word },
        ...{ instrumentId: row.instrumentId, measuredAt: row.measuredAt, claimedAt: row.claimedAt },
        detail: JSON.stringify(read.detail),
        // What was asked of the old difference is asked of the new one by the rules of the drift.
        doubts: JSON.stringify(row.doubts.filter(({ reason: why }) => why !== 'jump' && why !== 'spread')),
        supersedesId: row.id,
        reason: `Told anew, because the initial was corrected: ${reason}`,
        recordedBy: actor.personId,
      })
      .execute()
  }
}

/** An initial from which differences were told is corrected, not voided: they would be told from nothing. */
export async function refuseVoidOfStart(trx: Trx, initial: ReadingRow): Promise<void> {
  const { readings } = await restingOn(trx, initial)
  if (readings.length === 0) return
  throw refuse.conflict(
    `${counted(readings.length, 'later reading is', 'later readings are')} told from this initial. Correct it instead; they are then told anew.`,
  )
}

async function restingOn(trx: Trx, initial: ReadingRow) {
  const { attribute, batchId, plan, studyId } = initial
  if (initial.studyStationId !== null || !toldApart.has(attributeOf(attribute, plan).kind))
    return { readings: [] as FrameReading[], start: { initial: null, emulsionType: null } }
  const frame = await loadFrame(trx, studyId)
  const isLater = (row: FrameReading) =>
    row.batchId === batchId && row.attribute === attribute && row.studyStationId !== null
  return { readings: frame.readings.filter(isLater), start: startOf(frame, batchId, attribute) }
}
