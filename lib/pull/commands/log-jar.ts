import { sql } from 'kysely'
import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { refuse } from '@/lib/http/errors'
import { claimedInstant } from '@/lib/reading/rules/claimed-time'
import type { JarToLog } from '@/lib/reading/schema/entry'
import { lockStudyOfPullJar, recomputeSeries, type Recomputed } from '@/lib/series/commands'
import { loadFrame, type Frame } from '@/lib/series/queries/frame'
import { dayIn } from '@/lib/study/rules/calendar'
import { findPullJar, type PullJar } from '../queries/pull-jar'
import { askFirst, judgeEntries, type Doubted } from '../rules/judge-entries'
import { readEntries, type ReadEntry } from '../rules/read-entries'
import { refuseAlreadyRead, refuseOver, refuseStale } from '../rules/refusals'

export type LoggedJar = {
  pullJarId: string
  jarCode: string
  version: number
  state: string
  measuredAt: string
  readings: {
    id: string
    attribute: string
    replicate: number
    value: number | null
    doubts: { reason: string; sentence: string }[]
  }[]
} & Recomputed

/**
 * Keeps the readings of one jar in one pull, closes it, and recomputes what they touch, all or nothing. Sent twice
 * it keeps one; read by a second person it asks which one counts.
 */
export async function logJar(trx: Trx, actor: Actor, input: JarToLog): Promise<LoggedJar> {
  const studyId = await lockStudyOfPullJar(trx, input.pullJarId)
  const instrumentIds = input.readings.flatMap(({ instrumentId }) => (instrumentId ? [instrumentId] : []))
  const jar = studyId && (await findPullJar(trx, input.pullJarId, instrumentIds))
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  const frame = await loadFrame(trx, jar.studyId)
  const sentBefore = frame.readings.filter((row) => input.readings.some((entry) => entry.id === row.id))
  if (sentBefore.length > 0) return answerAgain(jar, frame, actor, sentBefore)

  refuseOver(jar)
  const entries = readEntries(jar, frame, input.readings)
  if (jar.state === 'done' && !input.resolution) refuseAlreadyRead(jar, frame, entries)
  refuseStale(jar, input.version)
  const { measuredAt, clock } = claimedInstant(input, jar.now)
  refuseTooEarly(jar, measuredAt)
  const { doubts, questions } = judgeEntries(jar, frame, entries, measuredAt)
  if (jar.state !== 'done') askFirst(jar, questions, input)

  const isTheirs = jar.state === 'done' && input.resolution?.count === 'theirs'
  const notes = { ...(clock ? { clock } : {}), ...circumstances(jar, frame, measuredAt) }
  const rows = rowsOf(jar, frame, actor, input, entries, { doubts, measuredAt, notes })
  await trx
    .insertInto('reading')
    .values([...rows, ...(isTheirs ? rows.map((row) => voidOf(row, input.resolution!.reason)) : [])])
    .execute()
  const version = await closeJar(trx, actor, jar, input)
  if (!isTheirs) keepInFrame(frame, jar, rows, doubts)
  const recomputed = await recomputeSeries(trx, actor, jar.studyId, {
    only: [...new Set(entries.map(({ entry }) => entry.attribute))],
    frame,
  })
  return {
    pullJarId: jar.id,
    jarCode: jar.code,
    version,
    state: 'done',
    measuredAt,
    readings: rows.map(({ id, attribute, replicate, value }) => ({
      id,
      attribute,
      replicate,
      value,
      doubts: doubts.get(id) ?? [],
    })),
    ...recomputed,
  }
}

type Row = ReturnType<typeof rowsOf>[number]

function rowsOf(
  jar: PullJar,
  frame: Frame,
  actor: Actor,
  input: JarToLog,
  entries: readonly ReadEntry[],
  found: { doubts: Doubted; measuredAt: string; notes: Record<string, unknown> },
) {
  const isMine = jar.state === 'done' && input.resolution?.count === 'mine'
  return entries.map(({ entry, read }) => {
    const theirs = isMine
      ? frame.readings.find(
          (row) =>
            row.pullJarId === jar.id &&
            row.attribute === entry.attribute &&
            row.replicate === entry.replicate,
        )
      : undefined
    return {
      id: entry.id,
      studyId: jar.studyId,
      batchId: jar.batchId,
      studyStationId: jar.studyStationId,
      pullJarId: jar.id,
      jarId: jar.jarId,
      attribute: entry.attribute,
      replicate: entry.replicate,
      value: read.value as number | null,
      word: read.word,
      typed: entry.typed,
      detail: JSON.stringify({ ...read.detail, ...found.notes }),
      instrumentId: entry.instrumentId ?? null,
      doubts: JSON.stringify(found.doubts.get(entry.id) ?? []),
      isVoid: false,
      supersedesId: theirs?.id ?? null,
      reason: theirs ? input.resolution!.reason : null,
      measuredAt: found.measuredAt,
      claimedAt: input.claimedAt,
      recordedBy: actor.personId,
    }
  })
}

function voidOf(row: Row, reason: string): Row {
  return {
    ...row,
    id: newId(),
    value: null,
    word: null,
    typed: '',
    detail: '{}',
    doubts: '[]',
    isVoid: true,
    supersedesId: row.id,
    reason,
  }
}

/** In one statement: the jar of the pull is done, and a jar that was opened is spent. */
async function closeJar(trx: Trx, actor: Actor, jar: PullJar, input: JarToLog): Promise<number> {
  const jarState = jar.asks === 'watch' ? 'stored' : 'spent'
  const isFirst = jar.state !== 'done'
  const { rows } = await sql<{ version: number }>`
    with moved as (
      update jar set state = ${jarState}, version = version + 1
        where id = ${jar.jarId} and state <> ${jarState}
    )
    update pull_jar set state = 'done', version = version + 1,
        closed_at = case when ${isFirst} then app_now() else closed_at end,
        closed_by = case when ${isFirst} then ${actor.personId}::uuid else closed_by end,
        note = case when ${input.note} = '' then note else ${input.note} end
      where id = ${jar.id} and version = ${input.version}
      returning version
  `.execute(trx)
  if (!rows[0]) refuseStale(jar, -1)
  return rows[0]!.version
}

/** The series are computed from what the database now holds, without asking it again. */
function keepInFrame(frame: Frame, jar: PullJar, rows: readonly Row[], doubts: Doubted): void {
  const superseded = new Set(rows.flatMap((row) => (row.supersedesId ? [row.supersedesId] : [])))
  const kept = frame.readings.filter((row) => !superseded.has(row.id))
  const added = rows.map((row) => ({
    ...row,
    detail: JSON.parse(row.detail) as Record<string, unknown>,
    doubts: doubts.get(row.id) ?? [],
    jarCode: jar.code,
    pullId: jar.pullId,
    dueOn: jar.dueOn,
    repeatOf: jar.repeatOf,
    recordedAt: jar.now,
  }))
  frame.readings = [...kept, ...added].toSorted((a, b) => a.measuredAt.localeCompare(b.measuredAt))
  // The repeat that was pending has been read.
  const repeat = frame.study.repeats.find((one) => one.id === jar.id)
  if (repeat) repeat.state = 'done'
}

/** Noted beside the reading; the statistics use the actual time. */
function circumstances(jar: PullJar, frame: Frame, measuredAt: string): Record<string, unknown> {
  const day = dayIn(frame.study.zone, measuredAt)
  const isOutside = day < jar.windowFrom || day > jar.windowTo
  const restedHours =
    jar.takenAt && jar.asks !== 'watch'
      ? Math.max(0, Math.round((Date.parse(measuredAt) - Date.parse(jar.takenAt)) / 360_000) / 10)
      : null
  return {
    ...(isOutside ? { window: { from: jar.windowFrom, to: jar.windowTo } } : {}),
    ...(restedHours === null ? {} : { restedHours }),
  }
}

function refuseTooEarly(jar: PullJar, measuredAt: string): void {
  if (Date.parse(measuredAt) >= Date.parse(jar.startedAt)) return
  throw refuse.invalid(
    `This says jar ${jar.code} was measured before study ${jar.studyCode} began. Check the tablet's clock and the time given.`,
    { claimedAt: 'This time lies before the study.' },
  )
}

/** The same entries again, under another key: what was kept the first time. */
function answerAgain(jar: PullJar, frame: Frame, actor: Actor, rows: Frame['readings']): LoggedJar {
  if (rows.some((row) => row.pullJarId !== jar.id || row.recordedBy !== actor.personId)) {
    throw refuse.conflict(
      'One of these readings was kept before, for another jar. Reload, then enter it anew.',
    )
  }
  const keys = new Set(rows.map((row) => row.attribute))
  return {
    pullJarId: jar.id,
    jarCode: jar.code,
    version: jar.version,
    state: jar.state,
    measuredAt: rows[0]!.measuredAt,
    readings: rows.map(({ id, attribute, replicate, value, doubts }) => ({
      id,
      attribute,
      replicate,
      value,
      doubts,
    })),
    series: [],
    raised: [],
    cleared: [],
    repeats: frame.study.repeats
      .filter((repeat) => repeat.repeatOf === jar.id && keys.has(repeat.attribute))
      .map(({ id, jarCode, attribute }) => ({
        pullJarId: id,
        jarCode,
        name: jarCode,
        shelf: null,
        place: null,
        attribute,
      })),
  }
}
