import { sql } from 'kysely'
import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { spokenDay } from '@/lib/study/rules/calendar'
import type { newHolidays } from './schema'

/** No pull moves by this: those that fall on the days are shown, and a person moves them. Sent twice it happens once. */
export async function addHolidays(trx: Trx, actor: Actor, { holidays }: z.output<typeof newHolidays>) {
  const there = await trx
    .selectFrom('holiday')
    .select(['id', 'day', 'name'])
    .where('day', '=', sql<string>`any(${holidays.map((one) => one.day)}::date[])`)
    .orderBy('day')
    .execute()
  const ids = new Set(there.map((one) => one.id))
  const fresh = holidays.filter((one) => !ids.has(one.id))
  const taken = there.find((one) => fresh.some(({ day }) => day === one.day))
  if (taken) {
    throw refuse.invalid(
      `${spokenDay(taken.day)} is a holiday already: ${taken.name}. Take it out of the list, or remove that one first.`,
      { holidays: `${spokenDay(taken.day)} is there already.` },
    )
  }
  if (fresh.length > 0) {
    await trx
      .insertInto('holiday')
      .values(fresh.map((one) => ({ ...one, addedBy: actor.personId })))
      .execute()
  }
  return { added: fresh.length }
}

/** Pulls that were moved off the day stay where they are. */
export async function removeHoliday(trx: Trx, _actor: Actor, id: string) {
  const gone = await trx
    .deleteFrom('holiday')
    .where('id', '=', id)
    .returning(['day', 'name'])
    .executeTakeFirst()
  if (!gone) throw refuse.notFound('This holiday is gone already. Reload the page.')
  return gone
}
