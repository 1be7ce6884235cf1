import { sql } from 'kysely'
import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import { judgeCalibration, type CheckLot } from '@/lib/calibration/rules'
import type { CalibrationCheck, newCalibration } from '@/lib/calibration/schema'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { askAboutReach, lockStudiesOf, reachBack } from '@/lib/instrument/commands/reach-back'
import { findLots } from '@/lib/lot/queries'
import { ScienceError } from '@/lib/science/guard'
import { dayIn } from '@/lib/study/rules/calendar'

/** Append-only: a calibration done again is another row, and the newest one counts. */
export async function logCalibration(
  trx: Trx,
  actor: Actor,
  input: z.output<typeof newCalibration>,
  now: string,
) {
  const instrument = await trx
    .selectFrom('instrument')
    .select(['id', 'code', 'kind'])
    .select(sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'))
    .where('id', '=', input.instrumentId)
    .forNoKeyUpdate()
    .executeTakeFirst()
  if (!instrument) throw refuse.notFound('There is no such instrument. Choose it from the list.')
  const same = await trx
    .selectFrom('calibration')
    .select(['id', 'result'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (same) return same
  if (instrument.kind !== input.check.kind) {
    throw refuse.invalid(
      `${instrument.code} is a ${instrument.kind}, so it cannot take the check of a ${input.check.kind}.`,
      { 'check.kind': 'Another kind of instrument.' },
    )
  }
  const calibratedAt = input.calibratedAt ?? now
  if (Date.parse(calibratedAt) > Date.parse(now)) {
    throw refuse.invalid('A calibration cannot be done in the future. Correct its time.', {
      calibratedAt: 'This time is still to come.',
    })
  }
  const day = dayIn(instrument.zone, calibratedAt)
  if (input.dueOn <= day) {
    throw refuse.invalid('The next calibration is due after this one. Correct the due date.', {
      dueOn: 'This is not after the calibration.',
    })
  }
  const judged = judge(input, await findLots(trx, lotIdsOf(input.check)), day)
  const bad = { instrument, kind: 'calibration' as const, at: calibratedAt, day, sentence: judged.sentence }
  if (judged.result === 'doubtful') {
    await askAboutReach(trx, bad, input.isConfirmed)
    await lockStudiesOf(trx, instrument.id)
  }
  await trx
    .insertInto('calibration')
    .values({
      id: input.id,
      instrumentId: input.instrumentId,
      calibratedAt,
      dueOn: input.dueOn,
      result: judged.result,
      detail: JSON.stringify(judged.detail),
      note: input.note,
      recordedBy: actor.personId,
    })
    .execute()
  const reached =
    judged.result === 'doubtful' ? await reachBack(trx, actor, bad, { calibrationId: input.id }) : null
  return { id: input.id, result: judged.result, sentence: judged.sentence, reached }
}

function lotIdsOf(check: CalibrationCheck): string[] {
  if (check.kind === 'balance') return []
  const ids = check.kind === 'meter' ? check.points.map((point) => point.lotId) : [check.lotId]
  return [...new Set(ids.filter((id) => id !== undefined))]
}

/** Two buffers of the same pH have no slope: what cannot be computed is refused at its field, in words. */
function judge({ check }: z.output<typeof newCalibration>, lots: readonly CheckLot[], day: string) {
  try {
    return judgeCalibration(check, lots, day)
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    const problem = error.message.slice(error.message.indexOf(': ') + 2)
    const what = fieldWords[error.field] ?? 'A figure'
    throw refuse.invalid(`${what} ${problem}. Correct the figures.`, {
      [`check.${error.field}`]: `${what} ${problem}.`,
    })
  }
}

const fieldWords: Record<string, string> = {
  points: 'The buffers',
  temperatureC: 'The temperature',
  lotId: 'The lot chosen',
}
