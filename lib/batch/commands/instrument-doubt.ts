import { sql } from 'kysely'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { CalibrationDetail, Spindle } from '@/lib/instrument/queries/list'
import { instrumentDoubt } from '../rules/weighing'

type Kind = 'balance' | 'meter' | 'viscometer'
const words: Record<Kind, string> = { balance: 'balance', meter: 'meter', viscometer: 'viscometer' }

/** The instrument that was used, and what is doubtful about it now; null where none was named. */
export async function doubtOf(trx: Trx, id: string | null, kinds: readonly Kind[], field: string) {
  if (id === null) return null
  const found = await trx
    .selectFrom('instrument')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('calibration')
          .select(['calibration.dueOn', 'calibration.result'])
          .select((inner) => inner.ref('calibration.detail').$castTo<CalibrationDetail | null>().as('detail'))
          .whereRef('calibration.instrumentId', '=', 'instrument.id')
          .orderBy('calibration.calibratedAt', 'desc')
          .orderBy('calibration.id', 'desc')
          .limit(1)
          .as('newest'),
      (join) => join.onTrue(),
    )
    .select(['instrument.code', 'instrument.kind', 'instrument.isActive'])
    .select((eb) => eb.ref('instrument.spindles').$castTo<Spindle[]>().as('spindles'))
    .select(['newest.dueOn', 'newest.result', 'newest.detail'])
    .select(
      sql<string>`(app_now() at time zone coalesce((select time_zone from lab), 'UTC'))::date::text`.as(
        'today',
      ),
    )
    .where('instrument.id', '=', id)
    .executeTakeFirst()
  const told = (sentence: string) => refuse.invalid(sentence, { [field]: sentence })
  if (!found) throw told('That instrument is not in the lab’s list. Choose another.')
  if (!kinds.includes(found.kind as Kind)) {
    throw told(`${found.code} is no ${kinds.map((kind) => words[kind]).join(' or ')}. Choose one.`)
  }
  if (!found.isActive) throw told(`${found.code} is out of use. Choose another.`)
  return { ...found, doubt: instrumentDoubt(found, found.today) }
}
