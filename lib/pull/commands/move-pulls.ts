import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { spokenDay } from '@/lib/study/rules/calendar'
import { listPullsOnClosedDays } from '../queries/on-closed-days'
import type { MovedPulls } from '../schema'

/**
 * Plans pulls that stand on closed days on another day of their windows. Time points and windows stay, so nothing of
 * the statistics changes; each pull's row on the trail says from which day to which, who and why.
 */
export async function movePulls(trx: Trx, _actor: Actor, { moves }: MovedPulls) {
  await trx
    .selectFrom('pull')
    .select('id')
    .where('id', '=', sql<string>`any(${moves.map((one) => one.pullId)}::uuid[])`)
    .orderBy('id')
    .forUpdate()
    .execute()
  const offered = new Map((await listPullsOnClosedDays(trx)).map((pull) => [pull.pullId, pull]))
  for (const { pullId, from, to } of moves) {
    const pull = offered.get(pullId)
    if (!pull || pull.dueOn !== from) {
      throw refuse.conflict(
        `A pull of ${spokenDay(from)} was begun or moved meanwhile, so none of them is moved. Reload the page and choose again.`,
        { kind: 'pull', pullId },
      )
    }
    if (pull.to !== to) {
      const act =
        pull.to === null ? 'It has no working day inside its window' : `Its day is ${spokenDay(pull.to)}`
      throw refuse.conflict(
        `${pull.studyCode}, ${pull.label}, cannot move to ${spokenDay(to)}. ${act}; reload the page and choose again.`,
        { kind: 'pull', pullId },
      )
    }
  }
  await sql`
    update pull set due_on = v.day
    from (select unnest(${moves.map((one) => one.pullId)}::uuid[]) as id,
      unnest(${moves.map((one) => one.to)}::date[]) as day) v
    where pull.id = v.id
  `.execute(trx)
  return { moved: moves.length }
}
