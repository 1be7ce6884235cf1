import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { jarCodes } from '@/lib/jar/rules/code'
import { variantOf } from '@/lib/protocol/rules/plan'
import type { PlannedStation, ProtocolPlan } from '@/lib/protocol/schema'
import { listTakenPlaces } from '@/lib/station/queries/places'
import { freePlaces } from '@/lib/station/rules/places'
import type { InitialRow } from '@/lib/study/rules/initial'
import { plannedJars } from '@/lib/study/rules/jars'
import { pullsOf } from '@/lib/study/rules/pulls'
import type { LabCalendar } from '@/lib/study/rules/working-days'

// What a started study consists of: one statement a table, whatever the number of jars.

export async function insertBatches(
  trx: Trx,
  studyId: string,
  batchIds: string[],
  referenceIds: string[],
): Promise<void> {
  await trx
    .insertInto('studyBatch')
    .values(
      [...batchIds, ...referenceIds].map((batchId, position) => ({
        id: newId(),
        studyId,
        batchId,
        position,
        isReference: referenceIds.includes(batchId),
      })),
    )
    .execute()
}

export type StudyStation = { id: string; stationId: string; shelves: number; placesPerShelf: number }

export async function insertStations(
  trx: Trx,
  studyId: string,
  plan: ProtocolPlan,
  stations: { id: string; shelves: number; placesPerShelf: number }[],
): Promise<StudyStation[]> {
  const rows = stations.map((station) => ({ ...station, stationId: station.id, id: newId() }))
  await trx
    .insertInto('studyStation')
    .values(
      rows.map(({ id, stationId }, position) => ({
        id,
        studyId,
        stationId,
        position,
        voice: plan.stations[position]!.voice,
        isFreezeThaw: plan.stations[position]!.kind === 'freeze-thaw',
        temperatureC: plan.stations[position]!.temperatureC,
        variant: variantOf(plan.stations[position]!),
      })),
    )
    .execute()
  return rows
}

type PullRow = { id: string; position: number; timeWeeks: number }

export async function insertPulls(
  trx: Trx,
  studyId: string,
  plan: ProtocolPlan,
  stations: StudyStation[],
  startedOn: string,
  calendar: LabCalendar,
): Promise<PullRow[]> {
  const rows = plan.stations.flatMap((station, position) =>
    pullsOf(station, startedOn, plan.endWeeks, calendar).map((pull) => ({ ...pull, id: newId(), position })),
  )
  await trx
    .insertInto('pull')
    .values(
      rows.map(({ id, position, timeWeeks, label, dueOn, windowFrom, windowTo }) => ({
        id,
        studyId,
        studyStationId: stations[position]!.id,
        timeWeeks,
        label,
        dueOn,
        windowFrom,
        windowTo,
      })),
    )
    .execute()
  return rows
}

type JarRow = { id: string; position: number | null; kind: string; weeks: number[] }

export async function insertJars(
  trx: Trx,
  studyId: string,
  plan: ProtocolPlan,
  { batchIds, referenceIds }: { batchIds: string[]; referenceIds: string[] },
  stations: StudyStation[],
  random: () => number,
): Promise<JarRow[]> {
  const planned = plannedJars(plan, batchIds, referenceIds)
  const codes = await freeCodes(trx, planned.length, random)
  const taken = await listTakenPlaces(
    trx,
    stations.map((station) => station.stationId),
  )
  // Two of the study's stations may share one of the lab's: what the first takes is not free for the second.
  const places = stations.map((station, position) => {
    const free = freePlaces(
      station,
      taken.filter((place) => place.stationId === station.stationId),
      planned.filter((jar) => jar.position === position).length,
    )
    taken.push(...free.map((place) => ({ ...place, stationId: station.stationId })))
    return free
  })
  const rows = planned.map((jar, index) => ({
    ...jar,
    id: newId(),
    code: codes[index]!,
    spot: jar.position === null ? undefined : places[jar.position]!.shift(),
  }))
  await trx
    .insertInto('jar')
    .values(
      rows.map(({ id, code, batchId, position, kind, state, spot, setAsideFor }) => ({
        id,
        code,
        studyId,
        batchId,
        studyStationId: position === null ? null : stations[position]!.id,
        stationId: position === null ? null : stations[position]!.stationId,
        kind,
        state,
        shelf: spot?.shelf ?? null,
        place: spot?.place ?? null,
        setAsideFor: setAsideFor ?? null,
        fillHeightMm: plan.fillHeightMm,
      })),
    )
    .execute()
  return rows
}

/** A few more than needed, so that the odd code that is already on a jar costs no second question. */
async function freeCodes(trx: Trx, count: number, random: () => number): Promise<string[]> {
  const free = new Set<string>()
  while (free.size < count) {
    const drawn = jarCodes(count - free.size + 20, random)
    const taken = await trx
      .selectFrom('jar')
      .select('code')
      .where('code', '=', sql<string>`any(${drawn})`)
      .execute()
    const used = new Set(taken.map((jar) => jar.code))
    drawn.filter((code) => !used.has(code)).forEach((code) => free.add(code))
  }
  return [...free].slice(0, count)
}

export async function insertPullJars(
  trx: Trx,
  studyId: string,
  jars: JarRow[],
  pulls: PullRow[],
): Promise<void> {
  const pullAt = new Map(pulls.map((pull) => [`${pull.position} ${pull.timeWeeks}`, pull.id]))
  const rows = jars.flatMap((jar) =>
    jar.weeks.map((week) => ({
      id: newId(),
      pullId: pullAt.get(`${jar.position} ${week}`)!,
      jarId: jar.id,
      studyId,
      asks: jar.kind === 'watch' ? 'watch' : 'measuring',
    })),
  )
  await trx.insertInto('pullJar').values(rows).execute()
}

export async function insertInitial(
  trx: Trx,
  actor: Actor,
  studyId: string,
  initial: InitialRow[],
  startedAt: string,
): Promise<void> {
  if (initial.length === 0) return
  await trx
    .insertInto('reading')
    .values(
      initial.map((row) => ({
        id: newId(),
        studyId,
        recordedBy: actor.personId,
        ...row,
        detail: JSON.stringify(row.detail),
        measuredAt: row.measuredAt ?? startedAt,
      })),
    )
    .execute()
}

/** What the protocol asks for and the study does not have stands among its amendments from the first day. */
export async function insertNotStarted(
  trx: Trx,
  actor: Actor,
  studyId: string,
  stations: { sentence: string; planned: PlannedStation }[],
  reason: string,
): Promise<void> {
  if (stations.length === 0) return
  await trx
    .insertInto('studyAmendment')
    .values(
      stations.map(({ sentence, planned }, index) => ({
        id: newId(),
        studyId,
        number: index + 1,
        kind: 'not started',
        sentence,
        before: JSON.stringify({ station: planned }),
        reason,
        madeBy: actor.personId,
      })),
    )
    .execute()
}
