import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { counted } from '@/lib/study/rules/words'
import { spokenDay } from '@/lib/study/rules/calendar'
import { getDay } from '../queries/day'
import type { DayReview } from '../schema'

/** A second person has seen a day's entries. Own work is never reviewed, and nothing unseen is. */
export async function reviewDay(trx: Trx, actor: Actor, day: string, input: DayReview) {
  // Two reviews of one day, or one sent twice, wait for each other.
  await sql`select pg_advisory_xact_lock(hashtext('day_review'), hashtext(${day}))`.execute(trx)
  const found = await getDay(trx, actor, day)
  const before = found.reviews.find((one) => one.id === input.id)
  if (before) return { id: before.id, reviewedAt: before.reviewedAt, entries: before.entries }
  if (found.entryIds.length === 0) {
    throw refuse.conflict(`On ${spokenDay(day)} nothing was entered, so there is nothing to review.`)
  }
  if (found.isOwn) {
    throw refuse
      .forbidden(
        `You have entered data of ${spokenDay(day)} yourself. Ask another person of QA to review it.`,
      )
      .onTrail({ event: 'own day not reviewed', table: 'day_review', id: input.id })
  }
  const given = new Set(input.entryIds)
  const unseen = found.entryIds.filter((id) => !given.has(id)).length
  if (unseen > 0 || given.size !== found.entryIds.length) {
    throw refuse.stale(
      `${counted(unseen, 'entry', 'entries')} of ${spokenDay(day)} came since you opened it. Reload, look at what is new, then mark the day again.`,
      { unseen },
    )
  }
  if (found.unseenIds.length === 0) {
    throw refuse.conflict(
      `Everything of ${spokenDay(day)} is reviewed already, last by ${found.reviews.at(-1)!.by}.`,
    )
  }
  const row = await trx
    .insertInto('dayReview')
    .values({
      id: input.id,
      day,
      remark: input.remark,
      entryIds: found.entryIds,
      reviewedBy: actor.personId,
    })
    .returning(['id', 'reviewedAt'])
    .executeTakeFirstOrThrow()
  return { ...row, entries: found.entryIds.length }
}
