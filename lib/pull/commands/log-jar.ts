import type { Actor } from '@/lib/auth/actor'
import type { Trx } from '@/lib/db/client'
import { refuse } from '@/lib/http/errors'
import { readOnPhotos } from '@/lib/photo/queries/of-jar'
import { claimedInstant, paperInstant } from '@/lib/reading/rules/claimed-time'
import type { JarToLog } from '@/lib/reading/schema/entry'
import { lockStudyOfPullJar, recomputeSeries, type Recomputed } from '@/lib/series/commands'
import { loadFrame, type Frame } from '@/lib/series/queries/frame'
import { dayIn } from '@/lib/study/rules/calendar'
import { findPullJar, type PullJar } from '../queries/pull-jar'
import { askFirst, judgeEntries } from '../rules/judge-entries'
import { isKeptBefore } from '../rules/known-entries'
import { isAllRead, missingAttributes, readEntries, type ReadEntry } from '../rules/read-entries'
import {
  keepInFrame,
  outvoted,
  readingRows,
  standingIn,
  voidOf,
  type ReadingRow,
} from '../rules/reading-rows'
import { refuseAlreadyRead, refuseOver, refuseStale, refuseTooEarly } from '../rules/refusals'
import { closeJar, keepOpen } from './close-jar'

export type LoggedJar = {
  pullJarId: string
  jarCode: string
  version: number
  state: string
  measuredAt: string
  /** What is still to be read or left out; the jar stays open for it. */
  missing: string[]
  readings: {
    id: string
    attribute: string
    replicate: number
    value: number | null
    doubts: { reason: string; sentence: string }[]
  }[]
} & Recomputed

/**
 * Keeps the readings of one jar in one pull, closes it unless only a part was read, and recomputes what they touch, all
 * or nothing. Sent twice it keeps one; read by a second person it asks which one counts.
 */
export async function logJar(trx: Trx, actor: Actor, input: JarToLog): Promise<LoggedJar> {
  // Before the study is locked: pictures take their time.
  const readings = await readOnPhotos(trx, input.pullJarId, input.readings)
  const studyId = await lockStudyOfPullJar(trx, input.pullJarId)
  const jar =
    studyId &&
    (await findPullJar(trx, input.pullJarId, {
      instrumentIds: input.readings.flatMap(({ instrumentId }) => (instrumentId ? [instrumentId] : [])),
      entryIds: input.readings.map(({ id }) => id),
    }))
  if (!jar) throw refuse.notFound('There is no such jar in a pull.')
  const frame = await loadFrame(trx, jar.studyId)
  if (isKeptBefore(jar, actor, input)) return answerAgain(jar, frame)

  refuseOver(jar)
  const onRecord = frame.readings.filter((row) => row.pullJarId === jar.id)
  const entries = readEntries(jar, frame, readings)
  refuseNothing(input, entries, onRecord)
  const isRead = jar.state === 'done'
  const readTwice = entries.filter(({ entry }) => standingIn(jar, frame, entry.attribute, entry.replicate))
  if ((isRead || readTwice.length > 0) && !input.resolution) refuseAlreadyRead(jar, frame, entries)
  if (!isOwnProgress(jar, actor, input, onRecord)) refuseStale(jar, input.version)
  const { measuredAt, clock } = input.isFromPaper
    ? paperInstant(input.claimedAt, jar.now)
    : claimedInstant(input, jar.now)
  refuseTooEarly(jar, measuredAt, dayIn(frame.study.zone, measuredAt))
  const { doubts, questions } = judgeEntries(jar, frame, entries, measuredAt)
  const readNow = [...onRecord, ...entries.map(({ entry }) => entry)]
  const missing = missingAttributes(jar, readNow, input.leaveOut)
  if (!isRead) askFirst(questions, input.isPartial ? [] : missing)

  const isTheirs = input.resolution?.count === 'theirs'
  const rows = readingRows(jar, frame, actor, input, entries, { doubts, measuredAt, clock })
  const isVoided = (row: ReadingRow) =>
    isTheirs && (isRead || standingIn(jar, frame, row.attribute, row.replicate) !== undefined)
  const voidsOfTheirs = outvoted(jar, frame, actor, input, rows)
  if (rows.length > 0) {
    const voids = rows.filter(isVoided).map((row) => voidOf(row, input.resolution!.reason))
    await trx
      .insertInto('reading')
      .values([...rows, ...voids, ...voidsOfTheirs])
      .execute()
  }
  const closes = isRead || !input.isPartial || isAllRead(jar, readNow)
  const leftOut = input.leaveOut.filter((key) => !readNow.some((one) => one.attribute === key))
  const version = closes
    ? await closeJar(trx, actor, jar, input, leftOut)
    : await keepOpen(trx, actor, jar, input)
  const counting = rows.filter((row) => !isVoided(row))
  keepInFrame(frame, jar, counting, doubts, closes, voidsOfTheirs)
  const recomputed = await recomputeSeries(trx, actor, jar.studyId, {
    only: [...new Set(entries.map(({ entry }) => entry.attribute))],
    frame,
  })
  return {
    pullJarId: jar.id,
    jarCode: jar.code,
    version,
    state: closes ? 'done' : jar.state,
    measuredAt,
    missing: closes ? [] : missing,
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

function refuseNothing(input: JarToLog, entries: readonly ReadEntry[], onRecord: readonly unknown[]): void {
  const isClosing = !input.isPartial && (onRecord.length > 0 || input.readings.length > 0)
  if (entries.length > 0 || isClosing) return
  const sentence = 'There is nothing to keep: fill in at least one field.'
  throw refuse.invalid(sentence, { readings: sentence })
}

/**
 * A part adds to what is there, whatever was read meanwhile. And whoever read parts of a jar may close it on the version
 * from before them, because without network their answers come after the next part was typed.
 */
function isOwnProgress(
  jar: PullJar,
  actor: Actor,
  input: JarToLog,
  onRecord: readonly { recordedBy: string }[],
): boolean {
  if (jar.state === 'done') return false
  if (input.isPartial) return true
  return jar.openedBy === actor.personId && onRecord.some((row) => row.recordedBy === actor.personId)
}

/** The same entries again, under another key: what was kept the first time. */
function answerAgain(jar: PullJar, frame: Frame): LoggedJar {
  const kept = jar.keptEntries
  const keys = new Set(kept.map((row) => row.attribute))
  const onRecord = frame.readings.filter((row) => row.pullJarId === jar.id)
  return {
    pullJarId: jar.id,
    jarCode: jar.code,
    version: jar.version,
    state: jar.state,
    measuredAt: new Date(kept[0]?.measuredAt ?? jar.closedAt!).toISOString(),
    missing: jar.state === 'done' ? [] : missingAttributes(jar, onRecord),
    readings: kept.map(({ id, attribute, replicate, value, doubts }) => ({
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
