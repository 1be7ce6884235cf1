import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { AppError } from '@/lib/http/errors'
import { recomputeSeries } from '@/lib/series/commands'
import { spokenDay } from '@/lib/study/rules/calendar'
import { counted } from '@/lib/study/rules/words'
import { reachedReadings, reachOf } from '../queries/reach'
import { laterDoubt } from '../rules/trust'
import type { Reached } from '../schema'

type Bad = {
  instrument: { id: string; code: string }
  kind: 'calibration' | 'check'
  at: string
  day: string
  sentence: string
}

/** Before a bad result is kept: which readings it would reach. Asked once, and only where there are some. */
export async function askAboutReach(trx: Trx, bad: Bad, isConfirmed: boolean): Promise<void> {
  if (isConfirmed) return
  const reached = await reachOf(trx, bad.instrument.id, bad.at)
  if (reached.readings === 0) return
  throw new AppError(409, 'confirm', reachSentence(bad, reached), { detail: { reached } })
}

function reachSentence({ instrument, sentence }: Bad, { readings, studies, since }: Reached): string {
  const where = studies.map((study) => `${study.readings} of ${study.code}`).join(', ')
  const from = since
    ? `since it was last good on ${spokenDay(since.slice(0, 10))}`
    : 'before it was ever found good'
  return `${sentence} ${counted(readings, 'reading')} taken with ${instrument.code} ${from} will carry a doubt: ${where}. Is it so?`
}

/**
 * The doubt reaches back to what was read since the last good one. All running studies are locked first, in the order
 * of their ids: a jar that is saved at this moment is seen here, or sees the bad result itself.
 */
export async function reachBack(
  trx: Trx,
  actor: Actor,
  bad: Bad,
  from: { calibrationId: string } | { instrumentCheckId: string },
): Promise<Reached> {
  const readings = await reachedReadings(trx, bad.instrument.id, bad.at)
  if (readings.length === 0) return { readings: 0, studies: [], since: null }
  const doubt = laterDoubt(bad.instrument.code, bad, bad.day)
  await trx
    .insertInto('readingDoubt')
    .values(
      readings.map(({ id }) => ({
        id: newId(),
        readingId: id,
        ...doubt,
        ...from,
        recordedBy: actor.personId,
      })),
    )
    .execute()
  const studies = []
  for (const studyId of new Set(readings.map((reading) => reading.studyId))) {
    const own = readings.filter((reading) => reading.studyId === studyId)
    await recomputeSeries(trx, actor, studyId, { only: [...new Set(own.map((one) => one.attribute))] })
    studies.push({ code: own[0]!.code, readings: own.length })
  }
  return { readings: readings.length, studies, since: null }
}

export async function lockStudiesOf(trx: Trx, instrumentId: string): Promise<void> {
  await sql`
    select id from study where state <> 'closed' or id in (
      select study_id from reading where instrument_id = ${instrumentId}) order by id for no key update
  `.execute(trx)
}
