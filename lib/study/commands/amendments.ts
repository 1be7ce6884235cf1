import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { getCalendar } from '@/lib/holiday/queries'
import { refuse } from '@/lib/http/errors'
import { isJarCode, readJarCode } from '@/lib/jar/rules/code'
import { askedAt, pullLabel, stationName } from '@/lib/protocol/rules/plan'
import { mean } from '@/lib/science/mean'
import { loadFrame } from '@/lib/series/queries/frame'
import { initialOf } from '@/lib/series/rules/input'
import {
  jarsOfNewTime,
  refuseNewTime,
  withoutFuture,
  withTime,
  withTolerance,
} from '@/lib/study/rules/amendments'
import { spokenDay } from '@/lib/study/rules/calendar'
import { laidWhy, windowOf } from '@/lib/study/rules/pulls'
import { capital, counted } from '@/lib/study/rules/words'
import { layOut } from '@/lib/study/rules/working-days'
import type { AmendmentOf } from '@/lib/study/schema'
import type { Amended, AmendedStudy } from './amend-study'

// What each kind of amendment does; amend-study.ts has locked the study and writes it down.

export async function addTimePoint(
  trx: Trx,
  study: AmendedStudy,
  input: AmendmentOf<'time point'>,
): Promise<Amended> {
  const station = await getStation(trx, study, input.studyStationId)
  refuseNewTime(study.plan, station, input.week, study)
  const plan = withTime(study.plan, station.position, input.week)
  const planned = plan.stations[station.position]!
  const name = stationName(planned, station.position)
  const isLooked = askedAt(plan, planned, input.week, 'watch').length > 0
  const jars = jarsOfNewTime(
    planned,
    name,
    (await listStandingJars(trx, study.id, station.id)).map((batch) => ({
      ...batch,
      watch: isLooked ? batch.watch : [],
    })),
    input.isMeasured,
  )
  const window = windowOf(study.startedOn, input.week, planned.windowDays)
  const [laid] = layOut([window], await getCalendar(trx), { notBefore: study.today })
  const { dueOn, windowFrom, windowTo } = laid!
  const pullId = newId()
  await trx
    .insertInto('pull')
    .values({
      id: pullId,
      studyId: study.id,
      studyStationId: station.id,
      timeWeeks: input.week,
      label: pullLabel(planned, input.week, study.endWeeks),
      dueOn,
      windowFrom,
      windowTo,
    })
    .execute()
  await trx
    .insertInto('pullJar')
    .values(jars.map((jar) => ({ id: newId(), pullId, studyId: study.id, ...jar })))
    .execute()
  const spares = jars.filter((jar) => jar.asks === 'measuring').length
  const taken = spares === 0 ? 'the watch jars alone' : `${counted(spares, 'spare jar')} opened`
  return {
    sentence: `Week ${input.week} is added at ${name}, due on ${spokenDay(dueOn)}${laidWhy(laid!)}, ${taken}.`,
    studyStationId: station.id,
    before: { timePoints: study.plan.stations[station.position]!.timePoints },
    after: { timePoints: planned.timePoints },
    plan,
  }
}

/** A retain stood nowhere in the plan, so nothing read of it enters a series; what it was for is the reason. */
export async function pullRetain(
  trx: Trx,
  study: AmendedStudy,
  input: AmendmentOf<'retain'>,
): Promise<Amended> {
  const code = readJarCode(input.jarCode)
  const fault = (sentence: string) => refuse.invalid(sentence, { jarCode: sentence })
  if (!code || !isJarCode(code)) {
    throw fault(`${input.jarCode.slice(0, 20)} is no jar code. Read the label again: five characters.`)
  }
  const jar = await trx
    .selectFrom('jar')
    .innerJoin('batch', 'batch.id', 'jar.batchId')
    .select(['jar.id', 'jar.code', 'jar.kind', 'jar.state', 'jar.setAsideFor', 'batch.code as batchCode'])
    .where('jar.studyId', '=', study.id)
    .where('jar.code', '=', code)
    .forUpdate('jar')
    .executeTakeFirst()
  if (!jar) throw fault(`No jar of ${study.code} has the code ${code}. Read the label again.`)
  if (jar.kind !== 'retain')
    throw fault(`Jar ${code} is a ${jar.kind} jar. Only a retain is pulled this way.`)
  if (jar.state !== 'kept')
    throw fault(`Retain ${code} is ${jar.state} already. Choose one that is still kept.`)
  await trx
    .updateTable('jar')
    .set((eb) => ({ state: 'spent', version: eb('version', '+', 1) }))
    .where('id', '=', jar.id)
    .execute()
  const what = jar.setAsideFor ? `, set aside for ${jar.setAsideFor},` : ''
  return {
    sentence: `Retain ${code} of ${jar.batchCode}${what} is pulled.`,
    before: { jar: code, state: 'kept' },
    after: { jar: code, state: 'spent' },
  }
}

export async function endStation(
  trx: Trx,
  actor: Actor,
  study: AmendedStudy,
  input: AmendmentOf<'station end'>,
  now: string,
): Promise<Amended> {
  const station = await getStation(trx, study, input.studyStationId)
  const name = stationName(study.plan.stations[station.position]!, station.position)
  if (station.endedOn)
    throw refuse.conflict(`${capital(name)} ended on ${spokenDay(station.endedOn)} already.`)
  if (station.running < 2) {
    throw refuse.conflict(`${capital(name)} is the last station that still runs. End the study instead.`)
  }
  if (station.resting) {
    throw refuse.conflict(
      `Jar ${station.resting} rests at ${name} and is not read yet. Read it, or say why it is missed; then end the station.`,
    )
  }
  await trx.updateTable('studyStation').set({ endedOn: study.today }).where('id', '=', station.id).execute()
  const missed = await trx
    .updateTable('pullJar')
    .set((eb) => ({
      state: 'missed',
      missedReason: `Amendment ${study.number} ended ${name}: ${input.reason}`,
      closedAt: now,
      closedBy: actor.personId,
      version: eb('version', '+', 1),
    }))
    .where('state', '=', 'due')
    .where('pullId', 'in', (eb) =>
      eb.selectFrom('pull').select('pull.id').where('pull.studyStationId', '=', station.id),
    )
    .returning('id')
    .execute()
  // Kept for later questions, and out of the station's places.
  const kept = await trx
    .updateTable('jar')
    .set((eb) => ({ state: 'kept', shelf: null, place: null, version: eb('version', '+', 1) }))
    .where('studyStationId', '=', station.id)
    .where('state', '=', 'stored')
    .returning('id')
    .execute()
  return {
    sentence: `${capital(name)} ended on ${spokenDay(study.today)}; ${counted(missed.length, 'jar')} of its pulls ${missed.length === 1 ? 'is' : 'are'} not read, ${counted(kept.length, 'jar')} ${kept.length === 1 ? 'is' : 'are'} kept.`,
    studyStationId: station.id,
    before: { timePoints: study.plan.stations[station.position]!.timePoints },
    after: { endedOn: study.today },
    plan: withoutFuture(study.plan, station.position, study),
  }
}

export async function changeTolerance(
  trx: Trx,
  study: AmendedStudy,
  input: AmendmentOf<'tolerance'>,
): Promise<Amended> {
  const frame = await loadFrame(trx, study.id)
  const initials = frame.study.batches.map((batch) => {
    const values = initialOf(frame, batch.id, input.attribute)
    return { batch: batch.code, value: values.length > 0 ? mean(values) : null }
  })
  const { plan, sentence } = withTolerance(study.plan, input.attribute, input.tolerance, initials)
  const was = study.plan.attributes.find((one) => one.attribute === input.attribute)?.tolerance
  return {
    sentence,
    before: { attribute: input.attribute, tolerance: was },
    after: { attribute: input.attribute, tolerance: input.tolerance },
    plan,
    rejudged: [input.attribute],
  }
}

/** One of the study's stations, how many still run, and a jar that rests there. */
async function getStation(trx: Trx, study: AmendedStudy, id: string) {
  const station = await trx
    .selectFrom('studyStation as ss')
    .select(['ss.id', 'ss.position', 'ss.endedOn'])
    .select((eb) => [
      eb
        .selectFrom('studyStation as other')
        .whereRef('other.studyId', '=', 'ss.studyId')
        .where('other.endedOn', 'is', null)
        .select((count) => count.fn.countAll<number>().as('running'))
        .as('running'),
      eb
        .selectFrom('pullJar as pj')
        .innerJoin('pull', 'pull.id', 'pj.pullId')
        .innerJoin('jar', 'jar.id', 'pj.jarId')
        .whereRef('pull.studyStationId', '=', 'ss.id')
        .where('pj.state', '=', 'resting')
        .select((min) => min.fn.min('jar.code').as('code'))
        .as('resting'),
    ])
    .where('ss.id', '=', id)
    .where('ss.studyId', '=', study.id)
    .executeTakeFirst()
  if (!station) throw refuse.notFound(`${study.code} has no such station. Choose one of its own.`)
  return { ...station, running: Number(station.running) }
}

/** Watch jars, and spares that nothing asks for yet, by batch. */
async function listStandingJars(trx: Trx, studyId: string, studyStationId: string) {
  const { rows } = await sql<{ batchId: string; code: string; watch: string[]; spares: string[] }>`
    select b.id as "batchId", b.code,
      coalesce(jsonb_agg(j.id order by j.code) filter (where j.kind = 'watch'), '[]') as watch,
      coalesce(jsonb_agg(j.id order by j.shelf, j.place, j.code) filter (where j.kind = 'spare' and j.state = 'stored'
        and not exists (select 1 from pull_jar pj where pj.jar_id = j.id and pj.state <> 'missed')), '[]') as spares
    from study_batch sb join batch b on b.id = sb.batch_id
      left join jar j on j.study_id = sb.study_id and j.batch_id = b.id and j.study_station_id = ${studyStationId}
        and j.state in ('stored', 'pulled', 'resting')
    where sb.study_id = ${studyId}
    group by b.id, b.code, sb.position order by sb.position
  `.execute(trx)
  return rows
}
