import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { calendarOfLab } from '@/lib/holiday/queries'
import { refuse } from '@/lib/http/errors'
import { findProtocolVersion } from '@/lib/protocol/queries'
import { recomputeSeries } from '@/lib/series/commands'
import { holdPlaces } from '@/lib/station/commands/hold-places'
import { listLeavings } from '@/lib/station/queries/places'
import { listStations } from '@/lib/station/queries/stations'
import {
  insertBatches,
  insertInitial,
  insertJars,
  insertNotStarted,
  insertPullJars,
  insertPulls,
  insertStations,
} from '@/lib/study/commands/fill-study'
import { listBatchesForStart } from '@/lib/study/queries/batches'
import { dayIn } from '@/lib/study/rules/calendar'
import { initialRows, type InitialRow } from '@/lib/study/rules/initial'
import { notStarted, refuseInPart } from '@/lib/study/rules/in-part'
import { plansOfBatches } from '@/lib/study/rules/jars'
import { adjustedPlan, startedChoices } from '@/lib/study/rules/plan'
import { refuseBatches, refusePlan, refuseShortBatch, refuseStations } from '@/lib/study/rules/refusals'
import { chosenStations } from '@/lib/study/rules/stations'
import type { LabCalendar } from '@/lib/study/rules/working-days'
import type { StartedStudy } from '@/lib/study/schema'

/**
 * Starts a study: locks the protocol's version and makes stations, jars with codes and places, the calendar of
 * pulls, what each pull asks of which jar, and the initial readings. Refuses, with what would help, whatever
 * could not be carried out.
 */
export async function startStudy(
  trx: Trx,
  actor: Actor,
  input: StartedStudy,
  random: () => number = Math.random,
) {
  const { now, calendar, nextNumber } = await holdStarts(trx)
  const same = await trx
    .selectFrom('study')
    .select(['id', 'code'])
    .where('id', '=', input.id)
    .executeTakeFirst()
  if (same) return { ...same, jars: await countJars(trx, input.id) }

  const version = await findProtocolVersion(trx, input.protocolVersionId)
  if (!version) throw refuse.notFound('There is no such protocol. Choose one from the list.')
  refuseInPart(version.plan, input.adjustments, input.whyInPart)
  const plan = adjustedPlan(version.plan, input.adjustments)
  refusePlan(plan)
  const taken = { batchIds: unique(input.batchIds), referenceIds: unique(input.referenceIds) }
  const batches = await findBatches(trx, [...taken.batchIds, ...taken.referenceIds])
  refuseBatches(plan, batches, taken)
  const plans = plansOfBatches(plan, taken.batchIds, taken.referenceIds)
  plans.forEach((own, index) => refuseShortBatch(own.plan, batches[index]!))
  const lab = await listStations(trx, actor)
  const stations = refuseStations(
    plan,
    chosenStations(plan.stations, lab, startedChoices(version.plan, input.adjustments, input.stationChoices)),
    taken,
    {
      protocolPlan: version.plan,
      adjustments: input.adjustments,
      stations: lab,
      leavings: await listLeavings(trx),
      today: dayIn(calendar.timeZone, now),
    },
  )
  const initial = initialRows(plan.attributes, batches, input.initialReadings)
  const startedAt = input.startedAt ?? now
  refuseFuture(startedAt, initial, now)
  const code = input.code ?? `S-${String(nextNumber).padStart(3, '0')}`
  await refuseTaken(trx, code, input.clientId)

  if (version.state === 'draft') {
    await trx
      .updateTable('protocolVersion')
      .set((eb) => ({ state: 'locked', version: eb('version', '+', 1) }))
      .where('id', '=', version.id)
      .execute()
  }
  const startedOn = dayIn(calendar.timeZone, startedAt)
  await trx
    .insertInto('study')
    .values({
      id: input.id,
      code,
      title: input.title,
      protocolVersionId: version.id,
      plan: JSON.stringify(plan),
      protocolApproval: version.state === 'approved' ? 'approved' : 'not approved',
      clientId: input.clientId,
      isShared: input.isShared,
      startedAt,
      startedOn,
      endWeeks: plan.endWeeks,
      fillG: plan.fillG,
      createdBy: actor.personId,
    })
    .execute()
  await insertBatches(trx, input.id, taken.batchIds, taken.referenceIds)
  const studyStations = await insertStations(trx, input.id, plan, stations)
  const pulls = await insertPulls(trx, input.id, plan, studyStations, startedOn, calendar)
  const jars = await insertJars(trx, input.id, plan, taken, studyStations, random)
  await insertPullJars(trx, input.id, jars, pulls)
  await insertInitial(trx, actor, input.id, initial, startedAt)
  await insertNotStarted(
    trx,
    actor,
    input.id,
    notStarted(version.plan, input.adjustments, lab, taken).map((one) => ({
      ...one,
      planned: version.plan.stations[one.position]!,
    })),
    input.whyInPart,
  )
  await trx
    .insertInto('studyFollower')
    .values({ id: newId(), studyId: input.id, personId: actor.personId })
    .execute()
  await recomputeSeries(trx, actor, input.id)
  return { id: input.id, code, jars: jars.length }
}

/**
 * Starts are rare and share places, numbers and the grams of a batch: one lock lets them pass one by one. The
 * select around it sees what the start before it wrote, because each statement has its own snapshot.
 */
async function holdStarts(trx: Trx) {
  await holdPlaces(trx)
  const { rows } = await sql<{ now: string; calendar: LabCalendar; nextNumber: number }>`
    select app_now() as now, ${calendarOfLab} as calendar,
      coalesce((select max(substring(code from '^S-(\\d{1,6})$')::integer) from study), 0) + 1 as "nextNumber"
  `.execute(trx)
  return rows[0]!
}

async function countJars(trx: Trx, studyId: string): Promise<number> {
  const { jars } = await trx
    .selectFrom('jar')
    .select((eb) => eb.fn.countAll<number>().as('jars'))
    .where('studyId', '=', studyId)
    .executeTakeFirstOrThrow()
  return jars
}

function unique(ids: string[]): string[] {
  return [...new Set(ids)]
}

async function findBatches(trx: Trx, ids: string[]) {
  const found = await listBatchesForStart(trx, ids)
  return ids.map((id) => {
    const batch = found.find((one) => one.id === id)
    if (!batch) throw refuse.notFound('One of the batches is not there. Choose them from the list.')
    return batch
  })
}

function refuseFuture(startedAt: string, initial: InitialRow[], now: string): void {
  const latest = Date.parse(now)
  if (Date.parse(startedAt) > latest) {
    throw refuse.invalid('A study cannot have started in the future. Correct the start.', {
      startedAt: 'This time is still to come.',
    })
  }
  if (initial.some((row) => row.measuredAt !== undefined && Date.parse(row.measuredAt) > latest)) {
    throw refuse.invalid('An initial reading cannot be measured in the future. Correct its time.', {
      initialReadings: 'A time is still to come.',
    })
  }
}

async function refuseTaken(trx: Trx, code: string, clientId: string | null): Promise<void> {
  const taken = await trx.selectFrom('study').select('title').where('code', '=', code).executeTakeFirst()
  if (taken) {
    throw refuse.invalid(`${code} is already the code of "${taken.title}". Choose another one.`, {
      code: 'This code is taken.',
    })
  }
  if (clientId === null) return
  const client = await trx.selectFrom('client').select('id').where('id', '=', clientId).executeTakeFirst()
  if (!client) throw refuse.notFound('There is no such client. Choose one from the list.')
}
