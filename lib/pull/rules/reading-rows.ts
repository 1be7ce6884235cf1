import type { Actor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import type { AttributeKey } from '@/lib/reading/schema/attributes'
import type { JarToLog } from '@/lib/reading/schema/entry'
import type { Frame } from '@/lib/series/queries/frame'
import { dayIn } from '@/lib/study/rules/calendar'
import type { PullJar } from '../queries/pull-jar'
import type { Doubted } from './judge-entries'
import type { ReadEntry } from './read-entries'

export type ReadingRow = ReturnType<typeof readingRows>[number]

type Found = { doubts: Doubted; measuredAt: string; clock: { skewSeconds: number } | null }

/** The rows of the record: what was typed, what it comes to, and under which circumstances it was read. */
export function readingRows(
  jar: PullJar,
  frame: Frame,
  actor: Actor,
  input: JarToLog,
  entries: readonly ReadEntry[],
  { doubts, measuredAt, clock }: Found,
) {
  const notes = { ...(clock ? { clock } : {}), ...circumstances(jar, frame, measuredAt, input) }
  return entries.map(({ entry, read }) => {
    const theirs =
      input.resolution?.count === 'mine'
        ? standingIn(jar, frame, entry.attribute, entry.replicate)
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
      detail: JSON.stringify({ ...read.detail, ...notes }),
      instrumentId: entry.instrumentId ?? null,
      doubts: JSON.stringify(doubts.get(entry.id) ?? []),
      isVoid: false,
      supersedesId: theirs?.id ?? null,
      reason: theirs ? input.resolution!.reason : null,
      measuredAt,
      claimedAt: input.claimedAt,
      recordedBy: actor.personId,
    }
  })
}

/** What is on record of this jar in this pull and stands in the same place. */
export function standingIn(jar: PullJar, frame: Frame, attribute: string, replicate: number) {
  return frame.readings.find(
    (row) => row.pullJarId === jar.id && row.attribute === attribute && row.replicate === replicate,
  )
}

export function voidOf(row: ReadingRow, reason: string): ReadingRow {
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

/** Replicates of theirs beside which mine has none: where mine counts, they do not. A part leaves them to what is read next. */
export function outvoted(
  jar: PullJar,
  frame: Frame,
  actor: Actor,
  { resolution, isPartial }: JarToLog,
  rows: readonly ReadingRow[],
): ReadingRow[] {
  if (resolution?.count !== 'mine' || isPartial) return []
  const superseded = new Set(rows.map((row) => row.supersedesId))
  const theirs = frame.readings.filter(
    (row) =>
      row.pullJarId === jar.id &&
      row.recordedBy !== actor.personId &&
      !superseded.has(row.id) &&
      rows.some((mine) => mine.attribute === row.attribute),
  )
  return theirs.map((row) =>
    voidOf(
      {
        ...{ id: row.id, studyId: jar.studyId, batchId: jar.batchId, studyStationId: jar.studyStationId },
        ...{ pullJarId: jar.id, jarId: jar.jarId, replicate: row.replicate },
        attribute: row.attribute as AttributeKey,
        ...{ value: row.value, word: row.word, typed: row.typed, detail: '{}', doubts: '[]' },
        ...{ instrumentId: row.instrumentId, isVoid: false, supersedesId: null, reason: null },
        ...{ measuredAt: row.measuredAt, claimedAt: row.claimedAt ?? row.measuredAt },
        recordedBy: actor.personId,
      },
      resolution.reason,
    ),
  )
}

/** The series are computed from what the database now holds, without asking it again. */
export function keepInFrame(
  frame: Frame,
  jar: PullJar,
  rows: readonly ReadingRow[],
  doubts: Doubted,
  isClosed: boolean,
  voids: readonly ReadingRow[] = [],
): void {
  const superseded = new Set(
    [...rows, ...voids].flatMap((row) => (row.supersedesId ? [row.supersedesId] : [])),
  )
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
  if (repeat && isClosed) repeat.state = 'done'
}

/** Noted beside the reading; the statistics use the actual time. */
function circumstances(
  jar: PullJar,
  frame: Frame,
  measuredAt: string,
  input: JarToLog,
): Record<string, unknown> {
  const day = dayIn(frame.study.zone, measuredAt)
  const isOutside = day < jar.windowFrom || day > jar.windowTo
  const restedHours =
    jar.takenAt && jar.asks !== 'watch'
      ? Math.max(0, Math.round((Date.parse(measuredAt) - Date.parse(jar.takenAt)) / 360_000) / 10)
      : null
  return {
    ...(isOutside ? { window: { from: jar.windowFrom, to: jar.windowTo } } : {}),
    ...(restedHours === null ? {} : { restedHours }),
    ...(input.isFromPaper ? { isFromPaper: true } : {}),
  }
}
