import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { doneAt } from '@/lib/reading/rules/claimed-time'
import type { loggedTemperatures } from '@/lib/station/schema'

export async function logTemperatures(
  trx: Trx,
  actor: Actor,
  stationId: string,
  input: z.output<typeof loggedTemperatures>,
  now: string,
) {
  const station = await trx
    .selectFrom('station')
    .select(['id', 'name'])
    .where('id', '=', stationId)
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  const readings = input.readings.map((reading) => ({
    ...reading,
    measuredAt: input.deviceNow
      ? doneAt({ claimedAt: reading.measuredAt, deviceNow: input.deviceNow }, now)
      : reading.measuredAt,
  }))
  const late = readings.findIndex(({ measuredAt }) => Date.parse(measuredAt) > Date.parse(now))
  if (late !== -1) {
    throw refuse.invalid('A temperature cannot be read in the future. Correct its time.', {
      [`readings.${late}.measuredAt`]: 'This time is still to come.',
    })
  }
  const rows = await trx
    .insertInto('stationTemperature')
    .values(readings.map((reading) => ({ ...reading, stationId, recordedBy: actor.personId })))
    .onConflict((conflict) => conflict.column('id').doNothing())
    .returning('id')
    .execute()
  return { logged: rows.length }
}
