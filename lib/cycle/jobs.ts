import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import { permissions } from '@/lib/auth/permissions'
import type { Db, Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { env } from '@/lib/env'
import * as z from '@/lib/http/zod'
import { enqueue } from '@/lib/jobs/enqueue'
import { job } from '@/lib/jobs/job'
import { sendMail } from '@/lib/mail/send'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { overdueMail } from './mail'
import { cycleBoard, findCyclePlace } from './queries/board'
import { isCurrentPress } from './queries/current'
import { cycleState, type Running } from './rules/state'

const told = z.object({ alarmId: z.uuid(), personId: z.uuid() })

export const jobs = [
  job('cycle.watch', z.unknown(), ({ db, actor, jobId }) =>
    transact(db, actor, { requestId: jobId }, (trx) => raiseAlarms(trx, actor)),
  ),
  job('cycle.mail', told, async ({ db }, { alarmId, personId }) => {
    const found = await findOverdue(db, alarmId)
    const person = await db
      .selectFrom('person')
      .select(['name', 'email'])
      .where('id', '=', personId)
      .where('isActive', '=', true)
      .executeTakeFirst()
    if (!found || !person) return
    await sendMail(overdueMail(person, found, env().publicUrl), `${alarmId}.${personId}`)
  }),
]

/** Each half that is overdue now and was not told of is noted, and its mails exist when the note does. */
async function raiseAlarms(trx: Trx, actor: Actor): Promise<void> {
  const { now, places } = await cycleBoard(trx, actor)
  for (const place of places) {
    const state = cycleState({ ...place, asked: place.asked ?? undefined }, now)
    if (state.kind !== 'running' || !state.isOverdue) continue
    const begun = await trx
      .selectFrom('cyclePress')
      .select(['id', 'recordedBy'])
      .where('studyStationId', '=', place.id)
      .where('cycle', '=', state.cycle)
      .where('half', '=', state.half)
      .where('press', '=', 'begin')
      .where(isCurrentPress('cyclePress'))
      .executeTakeFirstOrThrow()
    if (await wasTold(trx, place.id, state)) continue
    const noted = await trx
      .insertInto('cycleAlarm')
      .values({ id: newId(), beginPressId: begun.id, dueAt: state.dueAt!, recordedBy: actor.personId })
      .onConflict((conflict) => conflict.column('beginPressId').doNothing())
      .returning('id')
      .executeTakeFirst()
    if (!noted) continue
    for (const personId of await whoEndsHalves(trx, begun.recordedBy))
      await enqueue(trx, 'cycle.mail', { alarmId: noted.id, personId })
  }
}

/** Also where its begin was corrected since; one that was taken back and begun anew is another half. */
async function wasTold(trx: Trx, studyStationId: string, { cycle, half }: Running): Promise<boolean> {
  const { rows } = await sql`
    select from cycle_alarm alarm join cycle_press begun on begun.id = alarm.begin_press_id
    where begun.study_station_id = ${studyStationId} and begun.cycle = ${cycle} and begun.half = ${half}
      and not exists (select from cycle_press gone where gone.study_station_id = begun.study_station_id
        and gone.cycle = begun.cycle and gone.half = begun.half and gone.is_void
        and gone.recorded_at > alarm.recorded_at)
  `.execute(trx)
  return rows.length > 0
}

/** Whoever began it, and the technicians: any of them may stand at the freezer when it is over. */
async function whoEndsHalves(trx: Trx, begunBy: string): Promise<string[]> {
  const rows = await trx
    .selectFrom('person')
    .select('id')
    .where('isActive', '=', true)
    .where('isSystem', '=', false)
    .where(sql<boolean>`roles && ${sql.val([...permissions['cycle.log']])}::text[]`)
    .where(sql<boolean>`(id = ${begunBy} or 'technician' = any(roles))`)
    .execute()
  return rows.map(({ id }) => id)
}

/** Null where it was ended or is held meanwhile: then nobody is troubled. */
async function findOverdue(db: Db, alarmId: string) {
  const alarm = await db
    .selectFrom('cycleAlarm as alarm')
    .innerJoin('cyclePress as begun', 'begun.id', 'alarm.beginPressId')
    .select(['begun.studyStationId', 'begun.cycle', 'begun.half', 'alarm.dueAt'])
    .select([
      sql<string>`app_now()`.as('now'),
      sql<string>`coalesce((select time_zone from lab limit 1), 'UTC')`.as('zone'),
    ])
    .where('alarm.id', '=', alarmId)
    .executeTakeFirst()
  const place = alarm && (await findCyclePlace(db, alarm.studyStationId))
  if (!alarm || !place || place.studyState !== 'running') return null
  const state = cycleState({ ...place, asked: place.asked ?? undefined }, alarm.now)
  const isIt = ({ cycle, half }: Running) => cycle === alarm.cycle && half === alarm.half
  if (state.kind !== 'running' || !isIt(state) || !state.isOverdue) return null
  const { studyCode, studyTitle, stationName } = place
  const time = new Intl.DateTimeFormat('en-GB', { timeZone: alarm.zone, timeStyle: 'short' })
  return {
    ...{ studyCode, studyTitle, stationName, cycle: state.cycle, half: state.half, begunBy: state.begunBy },
    dueAt: `on ${spokenDay(dayIn(alarm.zone, alarm.dueAt))} at ${time.format(new Date(alarm.dueAt))}`,
  }
}
