import { sql } from 'kysely'
import type { z } from 'zod'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { lockStudy, recomputeSeries } from '@/lib/series/commands'
import { holdPlaces } from '@/lib/station/commands/hold-places'
import { listLastMoves } from '@/lib/station/queries/moves'
import {
  listSeriesPlaces,
  listStandingJars,
  listTakenPlaces,
  type StandingJar,
} from '@/lib/station/queries/places'
import { listStations, type StationRow } from '@/lib/station/queries/stations'
import { moveEffects, targetsFor } from '@/lib/station/rules/moves'
import { capacityOf, freePlaces, type Place } from '@/lib/station/rules/places'
import type { movedJars } from '@/lib/station/schema'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital, counted } from '@/lib/study/rules/words'

type Input = z.output<typeof movedJars>

/**
 * Moves jars to free places of another station, all or none. Their series stay what they are: what another place
 * means for later readings is found when these are taken. Two moves, or a move and a start, pass one by one.
 */
export async function moveJars(trx: Trx, actor: Actor, fromStationId: string, input: Input, now: string) {
  await holdPlaces(trx)
  const sent = await trx.selectFrom('stationMove').select('id').where('id', '=', input.id).executeTakeFirst()
  if (sent) return { id: sent.id, moved: input.jarIds.length, effects: [] }
  const stations = await listStations(trx, actor)
  const from = stations.find((station) => station.id === fromStationId)
  const to = stations.find((station) => station.id === input.toStationId)
  if (!from) throw refuse.notFound()
  if (!to) throw fault('There is no such station. Choose one from the list.')
  if (to.id === from.id) throw fault(`The jars stand at ${from.name} already. Choose another station.`)
  if (!to.isActive) throw fault(`${capital(to.name)} is out of use. Choose another station.`)

  // What is read below builds on it: jars saved at this moment wait, as they do for each other.
  const studies = await listStudiesOf(trx, input.jarIds)
  for (const { id } of studies) await lockStudy(trx, id)
  const jars = await listStandingJars(trx, from.id, input.jarIds)
  await refuseGone(trx, from, jars, input.jarIds)
  await refuseDown(trx, to, now)
  const free = freePlaces(to, await listTakenPlaces(trx, [to.id]), jars.length)
  if (free.length < jars.length) refuseFull(to, free.length, jars, from.id, stations)

  const effects = moveEffects(jars, from, to, await listSeriesPlaces(trx, from.id))
  await writeMove(trx, actor, { from, to, input, jars, free, effects })
  for (const { id } of studies) await recomputeSeries(trx, actor, id)
  return { id: input.id, moved: jars.length, effects }
}

function fault(sentence: string) {
  return refuse.invalid(sentence, { toStationId: sentence })
}

/** In one order, so that two moves of the same studies never wait for each other. */
async function listStudiesOf(trx: Trx, jarIds: string[]) {
  return trx
    .selectFrom('jar')
    .select('studyId as id')
    .distinct()
    .where('id', '=', sql<string>`any(${jarIds}::uuid[])`)
    .orderBy('studyId')
    .execute()
}

/** Somebody else was quicker, or the jar was opened meanwhile: nothing is moved, and it is said which. */
async function refuseGone(trx: Trx, from: StationRow, jars: StandingJar[], jarIds: string[]): Promise<void> {
  const gone = jarIds.filter((id) => !jars.some((jar) => jar.id === id))
  if (gone.length === 0) return
  const [last] = await listLastMoves(trx, gone)
  const who = last
    ? ` ${last.movedBy} moved ${last.code} to ${last.toName}.`
    : ' They were opened, kept or moved meanwhile.'
  throw refuse.conflict(
    `${capital(counted(gone.length, 'jar'))} of these no longer ${gone.length === 1 ? 'stands' : 'stand'} at ${from.name}.${who} Nothing was moved; look at the shelves again.`,
    { kind: 'gone', jarIds: gone },
  )
}

async function refuseDown(trx: Trx, to: StationRow, now: string): Promise<void> {
  const lab = await trx.selectFrom('lab').select('timeZone').executeTakeFirst()
  const today = dayIn(lab?.timeZone ?? 'UTC', now)
  const down = await trx
    .selectFrom('stationDowntime as d')
    .leftJoin('stationDowntimeCancel as c', 'c.stationDowntimeId', 'd.id')
    .select(['d.toOn', 'd.reason'])
    .where('d.stationId', '=', to.id)
    .where('c.id', 'is', null)
    .where('d.fromOn', '<=', today)
    .where('d.toOn', '>=', today)
    .executeTakeFirst()
  if (!down) return
  throw fault(
    `${capital(to.name)} is out of use until ${spokenDay(down.toOn)}: ${down.reason}. Choose another station.`,
  )
}

function refuseFull(
  to: StationRow,
  free: number,
  jars: StandingJar[],
  fromId: string,
  stations: StationRow[],
): never {
  const offers = targetsFor(
    jars,
    fromId,
    stations.map((one) => ({ ...one, free: capacityOf(one) - one.takenPlaces })),
  )
  const other = offers.find(({ hasRoom, station }) => hasRoom && station.id !== to.id)
  const ways = [
    free > 0 ? `move ${counted(free, 'jar')} there and the rest elsewhere` : null,
    other
      ? `${other.station.name} has ${counted(other.station.free, 'free place')}${other.keeps ? '' : ', at another condition'}`
      : null,
  ].filter((way) => way !== null)
  throw refuse.conflict(
    `${capital(to.name)} has ${counted(free, 'free place')}, ${jars.length} are needed. ${ways.length > 0 ? `What would fit: ${ways.join('; ')}.` : 'No station has room for them: make some first.'}`,
    { kind: 'full', free, needed: jars.length },
  )
}

type Written = {
  from: StationRow
  to: StationRow
  input: Input
  jars: StandingJar[]
  free: Place[]
  effects: ReturnType<typeof moveEffects>
}

async function writeMove(trx: Trx, actor: Actor, { from, to, input, jars, free, effects }: Written) {
  await trx
    .insertInto('stationMove')
    .values({
      id: input.id,
      fromStationId: from.id,
      toStationId: to.id,
      reason: input.reason,
      movedBy: actor.personId,
    })
    .execute()
  const rows = jars.map((jar, index) => ({ jar, to: free[index]! }))
  await trx
    .insertInto('jarMove')
    .values(
      rows.map((row) => ({
        id: newId(),
        stationMoveId: input.id,
        jarId: row.jar.id,
        studyStationId: row.jar.studyStationId,
        fromShelf: row.jar.shelf,
        fromPlace: row.jar.place,
        toShelf: row.to.shelf,
        toPlace: row.to.place,
      })),
    )
    .execute()
  await sql`
    update jar set station_id = ${to.id}, shelf = moved.to_shelf, place = moved.to_place, version = jar.version + 1
    from jar_move moved where moved.station_move_id = ${input.id} and moved.jar_id = jar.id
  `.execute(trx)
  const following = effects.filter((effect) => effect.follows)
  if (following.length === 0) return
  await trx
    .insertInto('studyStationMove')
    .values(following.map(({ studyStationId }) => ({ id: newId(), stationMoveId: input.id, studyStationId })))
    .execute()
}
