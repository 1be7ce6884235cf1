import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { listTakenPlaces } from '@/lib/station/queries/places'
import type { changedStation, newStation } from '@/lib/station/schema'
import { capital, counted } from '@/lib/study/rules/words'
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
  await refuseNoRoom(trx, station, fields)
  await trx
    .updateTable('station')
    .set({ ...fields, version: version + 1 })
    .where('id', '=', id)
    .execute()
  return { version: version + 1 }
}

/** Jars stand where the map says: a place that is taken stays, and so does the station. */
async function refuseNoRoom(
  trx: Trx,
  station: { id: string; name: string },
  next: { shelves: number; placesPerShelf: number; isActive: boolean },
) {
  const taken = await listTakenPlaces(trx, [station.id])
  if (!next.isActive && taken.length > 0) {
    throw refuse.invalid(
      `${capital(counted(taken.length, 'jar'))} ${taken.length === 1 ? 'stands' : 'stand'} at ${station.name}. Move ${taken.length === 1 ? 'it' : 'them'} to another station first; then it goes out of use.`,
      { isActive: 'Jars stand here.' },
    )
  }
  const beyond = taken.find(
    ({ shelf, place }) => (shelf ?? 0) > next.shelves || (place ?? 0) > next.placesPerShelf,
  )
  if (!beyond) return
  throw refuse.invalid(
    `A jar stands on shelf ${beyond.shelf}, place ${beyond.place} of ${station.name}. Move the jars there first, or keep that place.`,
    { [(beyond.shelf ?? 0) > next.shelves ? 'shelves' : 'placesPerShelf']: 'Jars stand beyond this.' },
  )
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
