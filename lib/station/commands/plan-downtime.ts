import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { listDowntimes } from '@/lib/station/queries/downtimes'
import { periodText } from '@/lib/station/rules/downtime'
import type { cancelledDowntime, plannedDowntime } from '@/lib/station/schema'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital } from '@/lib/study/rules/words'

/** Days on which nothing can be pulled at a station. The row never changes; cancelling it is a row of its own. */
export async function planDowntime(
  trx: Trx,
  actor: Actor,
  stationId: string,
  input: z.output<typeof plannedDowntime>,
  now: string,
) {
  const { station, downtimes, today } = await hold(trx, stationId, now)
  if (downtimes.some((one) => one.id === input.id)) return { id: input.id }
  if (input.fromOn < today) {
    throw refuse.invalid('Downtime is planned ahead, and this begins in the past. Correct the first day.', {
      fromOn: `Today is ${spokenDay(today)}.`,
    })
  }
  const other = downtimes.find(
    (one) => one.cancelledAt === null && one.fromOn <= input.toOn && one.toOn >= input.fromOn,
  )
  if (other) {
    throw refuse.invalid(
      `${capital(station.name)} is out of use ${periodText(other)} already: ${other.reason}. Choose other days, or cancel that first.`,
      { fromOn: 'These days overlap with others.' },
    )
  }
  await trx
    .insertInto('stationDowntime')
    .values({ ...input, stationId, plannedBy: actor.personId })
    .execute()
  return { id: input.id }
}

export async function cancelDowntime(
  trx: Trx,
  actor: Actor,
  { id: stationId, downtimeId }: { id: string; downtimeId: string },
  input: z.output<typeof cancelledDowntime>,
  now: string,
) {
  const { downtimes } = await hold(trx, stationId, now)
  const found = downtimes.find((one) => one.id === downtimeId)
  if (!found) throw refuse.notFound('There is no such downtime ahead at this station. Reload the page.')
  if (found.cancelledAt !== null) {
    throw refuse.conflict(`${found.cancelledBy} cancelled it already. Reload to see it.`)
  }
  await trx
    .insertInto('stationDowntimeCancel')
    .values({ ...input, stationDowntimeId: downtimeId, cancelledBy: actor.personId })
    .execute()
  return { id: downtimeId }
}

/** Two who plan at the same moment wait for each other here, so that neither overlaps. */
async function hold(trx: Trx, stationId: string, now: string) {
  const station = await trx
    .selectFrom('station')
    .select(['id', 'name'])
    .where('id', '=', stationId)
    .forUpdate()
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  const lab = await trx.selectFrom('lab').select('timeZone').executeTakeFirst()
  const today = dayIn(lab?.timeZone ?? 'UTC', now)
  return { station, today, downtimes: await listDowntimes(trx, stationId, today) }
}
