import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db, Trx } from '@/lib/db/client'
import { getLabDay } from '@/lib/bench/queries/lab-day'
import { doubtsOf } from '@/lib/reading/queries/doubts'

export type DayReading = {
  id: string
  attribute: string
  replicate: number
  value: number | null
  word: string | null
  typed: string
  isVoid: boolean
  supersedesId: string | null
  reason: string | null
  doubts: { reason: string; sentence: string }[]
  isFromPaper: boolean
  measuredAt: string
  recordedAt: string
  by: string
  pullJarId: string
}
export type DayJar = {
  pullJarId: string
  code: string
  studyCode: string
  batchCode: string
  label: string
  temperatureC: number | null
  isFreezeThaw: boolean
  state: string
  note: string
  leftOut: string[]
}
export type DayMishap = {
  id: string
  kind: string
  reason: string
  code: string
  studyCode: string
  by: string
  happenedAt: string
  recordedAt: string
}
export type DayOnRecord = Awaited<ReturnType<typeof getDay>>

/** A day as QA reads it: every entry, the superseded and void ones too, and who has reviewed what of it. */
export async function getDay(db: Db | Trx, actor: Actor, day: string) {
  const { zone } = await getLabDay(db)
  // As a range, which an index serves.
  const within = (
    column: string,
  ) => sql<boolean>`${sql.ref(column)} >= (${day}::date::timestamp at time zone ${zone})
    and ${sql.ref(column)} < ((${day}::date + 1)::timestamp at time zone ${zone})`
  const { rows: readings } = await sql<DayReading & { recordedBy: string }>`
    select r.id, r.attribute, r.replicate, r.value, r.word, r.typed, r.is_void, r.supersedes_id, r.reason, ${doubtsOf('r')} as doubts,
      coalesce((r.detail ->> 'isFromPaper')::boolean, false) as is_from_paper, r.measured_at, r.recorded_at,
      p.initials as by, r.recorded_by, r.pull_jar_id
    from reading r join person p on p.id = r.recorded_by
    where r.pull_jar_id is not null and ${within('r.measured_at')}
    order by r.recorded_at, r.id
  `.execute(db)
  const { rows: jars } = await sql<DayJar>`
    select pj.id as pull_jar_id, jar.code, study.code as study_code, batch.code as batch_code, pull.label,
      ss.temperature_c, ss.is_freeze_thaw, pj.state, pj.note, pj.left_out
    from pull_jar pj
      join pull on pull.id = pj.pull_id
      join study_station ss on ss.id = pull.study_station_id
      join study on study.id = pj.study_id
      join jar on jar.id = pj.jar_id
      join batch on batch.id = jar.batch_id
    where pj.id = any(${[...new Set(readings.map((row) => row.pullJarId))]}::uuid[])
    order by ss.temperature_c nulls last, study.code, pull.time_weeks, jar.code
  `.execute(db)
  const { rows: mishaps } = await sql<DayMishap & { recordedBy: string }>`
    select m.id, m.kind, m.reason, jar.code, study.code as study_code, p.initials as by, m.happened_at, m.recorded_at,
      m.recorded_by
    from jar_mishap m
      join jar on jar.id = m.jar_id
      join study on study.id = m.study_id
      join person p on p.id = m.recorded_by
    where ${within('m.happened_at')}
    order by m.recorded_at, m.id
  `.execute(db)
  const { rows: photos } = await sql<{ id: string; code: string; pullJarId: string | null }>`
    select photo.id, jar.code, photo.pull_jar_id from photo join jar on jar.id = photo.jar_id
    where ${within('photo.taken_at')} order by photo.taken_at, photo.id limit 300
  `.execute(db)
  const reviews = await db
    .selectFrom('dayReview as d')
    .innerJoin('person', 'person.id', 'd.reviewedBy')
    .select(['d.id', 'd.remark', 'd.reviewedAt', 'd.reviewedBy', 'd.entryIds', 'person.name as by'])
    .where('d.day', '=', day)
    .orderBy('d.reviewedAt')
    .orderBy('d.id')
    .execute()
  const seen = new Set(reviews.flatMap((one) => one.entryIds))
  const entries = [...readings, ...mishaps]
  return {
    day,
    zone,
    entryIds: entries.map((one) => one.id),
    isOwn: entries.some((one) => one.recordedBy === actor.personId),
    /** Entered or corrected after it was reviewed. */
    unseenIds: entries.filter((one) => !seen.has(one.id)).map((one) => one.id),
    readings: readings.map(({ recordedBy: _, ...one }): DayReading => one),
    mishaps: mishaps.map(({ recordedBy: _, ...one }): DayMishap => one),
    jars,
    photos,
    reviews: reviews.map(({ entryIds, reviewedBy: _, ...one }) => ({ ...one, entries: entryIds.length })),
  }
}
