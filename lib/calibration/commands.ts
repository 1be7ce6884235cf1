import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import { judgeCalibration } from '@/lib/calibration/rules'
import type { newCalibration } from '@/lib/calibration/schema'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { ScienceError } from '@/lib/science/guard'

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
    .where('id', '=', input.instrumentId)
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
  if (input.dueOn <= calibratedAt.slice(0, 10)) {
    throw refuse.invalid('The next calibration is due after this one. Correct the due date.', {
      dueOn: 'This is not after the calibration.',
    })
  }
  const judged = judge(input)
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
  return { id: input.id, result: judged.result, sentence: judged.sentence }
}

/** Two buffers of the same pH have no slope: what cannot be computed is refused at its field. */
function judge(input: z.output<typeof newCalibration>) {
  try {
    return judgeCalibration(input.check)
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    throw refuse.invalid(`The check cannot be computed: ${error.message}. Correct the figures.`, {
      [`check.${error.field}`]: error.message,
    })
  }
}
