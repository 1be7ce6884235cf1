import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { findLots } from '@/lib/lot/queries'
import { doneAt } from '@/lib/reading/rules/claimed-time'
import { ScienceError } from '@/lib/science/guard'
import { dayIn } from '@/lib/study/rules/calendar'
import { judgeDailyCheck } from '../rules/daily-check'
import type { DailyCheck, DailyChecked } from '../schema'
import { askAboutReach, lockStudiesOf, reachBack } from './reach-back'

/** The morning's check of an instrument, judged here. Sent twice it is kept once; a bad one reaches back. */
export async function checkInstrument(
  trx: Trx,
  actor: Actor,
  instrumentId: string,
  input: DailyChecked,
  now: string,
) {
  const instrument = await trx
    .selectFrom('instrument')
    .select(['id', 'code', 'isActive'])
    .select((eb) => eb.ref('dailyCheck').$castTo<DailyCheck | null>().as('dailyCheck'))
    .select(sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'))
    .where('id', '=', instrumentId)
    .forNoKeyUpdate()
    .executeTakeFirst()
  if (!instrument) throw refuse.notFound('There is no such instrument.')
  const same = await trx
    .selectFrom('instrumentCheck')
    .select(['id', 'result', 'detail'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (same) return { ...same, reached: null }
  if (!instrument.dailyCheck) {
    throw refuse.conflict(
      `${instrument.code} has no daily check yet. A manager says what is checked: change the instrument.`,
    )
  }
  if (!instrument.isActive) throw refuse.conflict(`${instrument.code} is out of use, so it is not checked.`)
  const [lot = null] = await findLots(trx, input.lotId ? [input.lotId] : [])
  if (input.lotId && !lot)
    throw refuse.invalid('There is no such lot. Choose another.', { lotId: 'Choose another.' })
  const at = doneAt(input, now)
  const day = dayIn(instrument.zone, at)
  const judged = judge(instrument.dailyCheck, input, lot, day)
  const bad = { instrument, kind: 'check' as const, at, day, sentence: judged.sentence }
  if (judged.result === 'doubtful') {
    await askAboutReach(trx, bad, input.isConfirmed)
    await lockStudiesOf(trx, instrument.id)
  }
  const { read, temperatureC, lotId, note } = input
  await trx
    .insertInto('instrumentCheck')
    .values({
      id: input.id,
      instrumentId,
      checkedAt: at,
      claimedAt: input.claimedAt ?? null,
      result: judged.result,
      detail: JSON.stringify({ ...instrument.dailyCheck, read, temperatureC, ...judged }),
      lotId,
      note,
      recordedBy: actor.personId,
    })
    .execute()
  const reached =
    judged.result === 'doubtful' ? await reachBack(trx, actor, bad, { instrumentCheckId: input.id }) : null
  return { id: input.id, result: judged.result, detail: judged, reached }
}

function judge(
  check: DailyCheck,
  input: DailyChecked,
  lot: Parameters<typeof judgeDailyCheck>[2],
  day: string,
) {
  try {
    return judgeDailyCheck(check, input, lot, day)
  } catch (error) {
    if (!(error instanceof ScienceError)) throw error
    const problem = error.message.slice(error.message.indexOf(': ') + 2)
    throw refuse.invalid(`The check cannot be judged: the temperature ${problem}.`, {
      temperatureC: `The temperature ${problem}.`,
    })
  }
}
