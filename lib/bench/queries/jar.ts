import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Db } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { doubtsOf } from '@/lib/reading/queries/doubts'
import { readJarCode } from '@/lib/jar/rules/code'
import { jarsToRead, type BenchJarRow } from './jars'
import { getLabDay, type LabDay } from './lab-day'
import { benchJar } from './bench-jar'
import { startPhoto, type StartPhoto } from './start-photo'
import { sayWhyNotToRead } from './why-not-to-read'
import { listCurrentSeries, listInitialMeans, listLastReadings } from './values'

export type BenchJarPage = Awaited<ReturnType<typeof getBenchJar>>

/** Everything the pull screen needs of one jar, whichever of its pulls is to be read now. */
export async function getBenchJar(db: Db, _actor: Actor, typedCode: string) {
  const code = readJarCode(typedCode) ?? typedCode.trim().toUpperCase()
  const { zone, now, today } = await getLabDay(db)
  const row = await jarsToRead(db)
    .select(startPhoto)
    .where('jar.code', '=', code)
    // What is to be read comes before what was read, then the earliest due, then the newest read.
    .orderBy(sql`pj.state in ('due', 'resting') desc`)
    .orderBy(sql`case when pj.state in ('due', 'resting') then pull.due_on end`)
    .orderBy('pull.dueOn', 'desc')
    .limit(1)
    .executeTakeFirst()
  if (!row) throw refuse.notFound(await sayWhyNotToRead(db, code))
  const only = { batchId: row.batchId, studyStationId: row.studyStationId }
  const [page] = await listJarPages(db, [row], { zone, now, today }, only)
  return { ...page!, instruments: await listUsableInstruments(db, today) }
}

/** The pages of several jars at the price of one; the instruments are the same for all. */
export async function listJarPages(
  db: Db,
  rows: readonly (BenchJarRow & { startPhoto: StartPhoto | null })[],
  { zone, now, today }: LabDay,
  only?: { batchId: string; studyStationId: string },
) {
  const studyIds = [...new Set(rows.map((row) => row.studyId))]
  const values = {
    zone,
    series: await listCurrentSeries(db, studyIds),
    readings: await listLastReadings(db, studyIds, 3, only),
    initials: await listInitialMeans(db, studyIds),
  }
  const pullJarIds = rows.map((row) => row.pullJarId)
  const done = pullJarIds.length > 0 ? await listReadingsOf(db, pullJarIds) : []
  return rows.map((row) => ({
    ...benchJar(row, values, today, now),
    today,
    now,
    zone,
    endWeeks: row.endWeeks,
    isStudyRunning: row.studyState === 'running',
    station: {
      id: row.stationId,
      studyStationId: row.studyStationId,
      name: row.stationName,
      kind: row.stationKind,
      temperatureC: row.temperatureC,
      isFreezeThaw: row.isFreezeThaw,
      voice: row.voice,
      caution: row.caution,
    },
    tareG: row.tareG,
    grossG: row.grossG,
    fillHeightMm: row.fillHeightMm ?? row.plan.fillHeightMm,
    pack: row.plan.pack,
    note: row.note,
    startPhoto: row.startPhoto,
    /** Not due yet: what the screen says instead of offering fields. */
    isEarly:
      row.state === 'due' &&
      row.windowFrom > today &&
      !row.mishaps.some((one) => one.kind === 'pulled early'),
    /** What was already read of this jar in this pull, with corrections and voids. */
    readings: done.filter((reading) => reading.pullJarId === row.pullJarId),
  }))
}

async function listReadingsOf(db: Db, pullJarIds: string[]) {
  return db
    .selectFrom('reading as r')
    .innerJoin('person', 'person.id', 'r.recordedBy')
    .select(['r.id', 'r.pullJarId', 'r.attribute', 'r.replicate', 'r.value', 'r.word', 'r.typed'])
    .select(['r.measuredAt', 'r.isVoid', 'r.supersedesId', 'r.reason', 'person.initials as by'])
    .select(['r.instrumentId', 'r.recordedBy', 'r.recordedAt'])
    .select((eb) => eb.ref('r.detail').$castTo<Record<string, unknown>>().as('detail'))
    .select(doubtsOf('r').as('doubts'))
    .where('r.pullJarId', 'in', pullJarIds)
    .orderBy('r.recordedAt')
    .orderBy('r.id')
    .execute()
}

export async function listUsableInstruments(db: Db, today: string) {
  const rows = await db
    .selectFrom('instrument')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('calibration')
          .select(['calibration.dueOn', 'calibration.result'])
          .whereRef('calibration.instrumentId', '=', 'instrument.id')
          .orderBy('calibration.calibratedAt', 'desc')
          .limit(1)
          .as('newest'),
      (join) => join.onTrue(),
    )
    .select(['instrument.id', 'instrument.code', 'instrument.kind', 'instrument.name'])
    .select(['newest.dueOn', 'newest.result'])
    // As readings are doubted: the last daily check was bad, and no good calibration came after it.
    .select(
      sql<boolean>`coalesce((select event.is_check and event.result = 'doubtful' from (
          select true as is_check, result, checked_at as at from instrument_check where instrument_id = instrument.id
          union all
          select false, result, calibrated_at from calibration
            where instrument_id = instrument.id and result = 'good') event
        order by event.at desc limit 1), false)`.as('hasFailedCheck'),
    )
    .select((eb) =>
      eb.ref('instrument.spindles').$castTo<{ name: string; constant: number }[]>().as('spindles'),
    )
    .where('instrument.isActive', '=', true)
    .orderBy('instrument.code')
    .execute()
  return rows.map((row) => ({ ...row, isOverdue: row.dueOn === null || row.dueOn < today }))
}
