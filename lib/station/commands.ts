import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import type { changedStation, loggedTemperatures, newStation } from '@/lib/station/schema'
import { expectOne } from '@/lib/trail/queries'

export async function createStation(trx: Trx, _actor: Actor, input: z.output<typeof newStation>) {
  const same = await trx.selectFrom('station').select('id').where('id', '=', input.id).executeTakeFirst()
  if (same) return same
  await refuseTakenName(trx, input)
  await trx.insertInto('station').values(input).execute()
  return { id: input.id }
}

export async function changeStation(
  trx: Trx,
  _actor: Actor,
  id: string,
  { version, ...fields }: z.output<typeof changedStation>,
) {
  const station = await trx
    .selectFrom('station')
    .selectAll()
    .where('id', '=', id)
    .forUpdate()
    .executeTakeFirst()
  if (!station) throw refuse.notFound()
  if (station.version !== version)
    await expectOne(trx, undefined, { table: 'station', id, thing: station.name })
  await refuseTakenName(trx, { id, name: fields.name })
  if (station.kind !== fields.kind || station.temperatureC !== fields.temperatureC) {
    const user = await trx
      .selectFrom('studyStation')
      .innerJoin('study', 'study.id', 'studyStation.studyId')
      .select('study.code')
      .where('studyStation.stationId', '=', id)
      .limit(1)
      .executeTakeFirst()
    if (user) {
      throw refuse.conflict(
        `${user.code} stands at ${station.name}, so its kind and temperature stay. Make another station instead.`,
      )
    }
  }
  await trx
    .updateTable('station')
    .set({ ...fields, version: version + 1 })
    .where('id', '=', id)
    .execute()
  return { version: version + 1 }
}

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
  const late = input.readings.findIndex(({ measuredAt }) => Date.parse(measuredAt) > Date.parse(now))
  if (late !== -1) {
    throw refuse.invalid('A temperature cannot be read in the future. Correct its time.', {
      [`readings.${late}.measuredAt`]: 'This time is still to come.',
    })
  }
  const rows = await trx
    .insertInto('stationTemperature')
    .values(input.readings.map((reading) => ({ ...reading, stationId, recordedBy: actor.personId })))
    .onConflict((conflict) => conflict.column('id').doNothing())
    .returning('id')
    .execute()
  return { logged: rows.length }
}

async function refuseTakenName(trx: Trx, { id, name }: { id: string; name: string }) {
  const taken = await trx
    .selectFrom('station')
    .select('id')
    .where('name', '=', name)
    .where('id', '!=', id)
    .executeTakeFirst()
  if (taken) {
    throw refuse.invalid(`There is already a station named ${name}. Give this one another name.`, {
      name: 'This name is taken.',
    })
  }
}
