import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { batchValue, measured } from '../rules/readings'
import { restHours } from '../rules/rest'
import type { BatchReadingInput } from '../schema'
import { assertState, findBatch, whenDone } from './find-batch'
import { doubtOf } from './instrument-doubt'

/**
 * A reading of the batch itself: a check while it is made, or its initial. An initial before the rest is over and a
 * correction say why; the same id again answers with what stands.
 */
export async function readBatch(trx: Trx, actor: Actor, code: string, input: BatchReadingInput) {
  const batch = await findBatch(trx, code)
  const { id, moment, attribute, replicate } = input
  const label = measured[attribute].label
  const readings = await trx
    .selectFrom('batchReading')
    .select(['id', 'replicate', 'supersedes', 'value'])
    .where('batchId', '=', batch.id)
    .where('moment', '=', moment)
    .where('attribute', '=', attribute)
    .execute()
  const kept = readings.find((reading) => reading.id === id)
  if (kept) return { id, value: kept.value }
  assertMoment(batch, input)
  const instrument = await doubtOf(
    trx,
    input.instrumentId,
    ['meter', 'viscometer', 'balance'],
    'instrumentId',
  )
  const value = batchValue(input, instrument?.spindles ?? [])
  if ('sentence' in value) throw refuse.invalid(value.sentence, { [value.field]: value.sentence })
  if (input.supersedes === null && readings.some((reading) => reading.replicate === replicate)) {
    throw refuse.conflict(
      `${label} ${replicate} of ${code} was read already. Correct it, or read another replicate.`,
    )
  }
  if (input.supersedes !== null) assertCorrection(label, readings, input)
  const at = { readAt: whenDone(batch, input), recordedAt: batch.now }
  const { typed, instrumentId, note, supersedes, reason, isFromPaper } = input
  await trx
    .insertInto('batchReading')
    .values({
      ...{ id, batchId: batch.id, moment, attribute, replicate, typed, value: value.value, ...at },
      ...{ instrumentId, instrumentDoubt: instrument?.doubt ?? null, note, supersedes, reason, isFromPaper },
      detail: JSON.stringify(value.detail),
      readBy: actor.personId,
    })
    .execute()
  return { id, value: value.value }
}

function assertMoment(batch: Awaited<ReturnType<typeof findBatch>>, input: BatchReadingInput) {
  if (input.moment === 'in process') {
    assertState(batch, ['making', 'resting'], 'Checks in process belong to making.')
    return
  }
  assertState(
    batch,
    ['resting', 'released'],
    batch.state === 'making' ? 'Its initial is read once it has rested.' : 'Nothing more is read of it.',
  )
  const rested = batch.restedHours ?? 0
  if (rested < restHours.least && !input.reason) {
    throw refuse.invalid(
      `${batch.code} has rested ${Math.floor(rested)} of ${restHours.least} h. Wait, or say why it is read now.`,
      { reason: 'Say why it is read before the rest is over.' },
    )
  }
}

function assertCorrection(
  label: string,
  readings: readonly { id: string; replicate: number; supersedes: string | null }[],
  { supersedes, replicate, reason }: BatchReadingInput,
) {
  const before = readings.find((reading) => reading.id === supersedes)
  if (before?.replicate !== replicate || readings.some((reading) => reading.supersedes === supersedes)) {
    throw refuse.conflict(`That ${label} was corrected already or is not there. Load the page again.`)
  }
  if (!reason) {
    throw refuse.invalid(`Say why ${label} ${replicate} is corrected.`, {
      reason: 'Say why the reading is corrected.',
    })
  }
}
