import { AppError, refuse } from '@/lib/http/errors'
import { agreementLimit } from '@/lib/science/plausible'
import type { AttributeKey } from '@/lib/reading/schema/attributes'
import type { Frame } from '@/lib/series/queries/frame'
import { initialOf, repeatabilitySd } from '@/lib/series/rules/input'
import { spokenDay } from '@/lib/study/rules/calendar'
import { mean } from '@/lib/science/mean'
import type { PullJar } from '../queries/pull-jar'
import type { ReadEntry } from './read-entries'

/** Refused before anything is looked at: the study is over, or the jar was given up. */
export function refuseOver(jar: PullJar): void {
  if (jar.studyState === 'closed') {
    throw refuse.conflict(`Study ${jar.studyCode} is closed, so jar ${jar.code} takes no more readings.`)
  }
  if (jar.state === 'missed') {
    throw refuse.conflict(
      `Jar ${jar.code} was marked as missed by ${jar.closerName}: "${jar.missedReason}". Ask them before it is read.`,
      { missedReason: jar.missedReason, by: jar.closerName, at: jar.closedAt },
    )
  }
}

/** Before the study, or before the window of its pull without word that this was so. */
export function refuseTooEarly(jar: PullJar, measuredAt: string, day: string): void {
  if (Date.parse(measuredAt) < Date.parse(jar.startedAt)) {
    throw refuse.invalid(
      `This says jar ${jar.code} was measured before study ${jar.studyCode} began. Check the tablet's clock and the time given.`,
      { claimedAt: 'This time lies before the study.' },
    )
  }
  if (day >= jar.windowFrom || jar.isPulledEarly) return
  throw new AppError(
    409,
    'early',
    `The window of jar ${jar.code} opens on ${spokenDay(jar.windowFrom)}. Note that it is pulled early, and why; then keep the readings.`,
    { detail: { windowFrom: jar.windowFrom, day } },
  )
}

export function refuseDone(jar: PullJar): void {
  if (jar.state !== 'done') return
  throw refuse.conflict(`Jar ${jar.code} was read already by ${jar.closerName}. Correct a reading instead.`, {
    by: jar.closerName,
    at: jar.closedAt,
  })
}

/** Someone has moved on with the jar since this screen was opened. */
export function refuseStale(jar: PullJar, version: number): void {
  if (jar.version === version) return
  const what =
    jar.state === 'done'
      ? `${jar.closerName} has read it`
      : jar.openerName
        ? `${jar.openerName} has opened it or taken it out`
        : 'it was changed'
  throw refuse.stale(
    `Jar ${jar.code} has moved on since you opened it: ${what}. What you typed is still here; look, then keep it again.`,
    {
      version: jar.version,
      state: jar.state,
      openedBy: jar.openerName
        ? { name: jar.openerName, initials: jar.openerInitials, at: jar.openedAt }
        : null,
      restUntil: jar.restUntil,
    },
  )
}

/** Both stay on record: the answer holds what the other has read, for the person to say which one counts. */
export function refuseAlreadyRead(jar: PullJar, frame: Frame, entries: readonly ReadEntry[]): never {
  const theirs = frame.readings.filter((row) => row.pullJarId === jar.id)
  // A jar that is read in part is in the hands of whoever kept the last part.
  const by =
    jar.state === 'done'
      ? { personId: jar.closedBy, name: jar.closerName, initials: jar.closerInitials }
      : { personId: jar.openedBy, name: jar.openerName, initials: jar.openerInitials }
  throw new AppError(
    409,
    'already read',
    `${by.name} has also read ${jar.code}. Both stay on record; say which one counts, and why.`,
    {
      detail: {
        version: jar.version,
        by,
        at: jar.state === 'done' ? jar.closedAt : jar.openedAt,
        readings: theirs.map(
          ({ id, attribute, replicate, value, word, typed, detail, measuredAt, instrumentId }) => ({
            id,
            attribute,
            replicate,
            value,
            word,
            typed,
            detail,
            measuredAt,
            instrumentId,
          }),
        ),
        comparisons: [...new Set(entries.map(({ entry }) => entry.attribute))].flatMap((key) =>
          compare(jar, frame, key, entries),
        ),
      },
    },
  )
}

export type Comparison = {
  attribute: AttributeKey
  mine: number
  theirs: number
  difference: number
  /** One standard deviation of a jar's own scatter. */
  scatter: number
  agree: boolean
}

function compare(jar: PullJar, frame: Frame, key: AttributeKey, entries: readonly ReadEntry[]): Comparison[] {
  const mine = entries.filter(({ entry }) => entry.attribute === key).map(({ read }) => read.value)
  const theirs = frame.readings
    .filter((row) => row.pullJarId === jar.id && row.attribute === key)
    .flatMap((row) => (row.value === null ? [] : [row.value]))
  const batch = frame.study.batches.find((one) => one.id === jar.batchId)
  const initial = initialOf(frame, jar.batchId, key)
  if (mine.length === 0 || theirs.length === 0 || !batch || initial.length === 0) return []
  const planned = frame.study.plan.attributes.find((one) => one.attribute === key)
  const s = repeatabilitySd(
    { attribute: key, own: planned?.own },
    batch,
    mean(initial),
    frame.study.plan.fillHeightMm,
  )
  const [a, b] = [mine, theirs].map((values) => ({
    time: 0,
    mean: mean(values),
    replicates: values.length,
    range: 0,
  }))
  const difference = Math.abs(a!.mean - b!.mean)
  return [
    {
      attribute: key,
      mine: a!.mean,
      theirs: b!.mean,
      difference,
      scatter: s,
      agree: difference <= agreementLimit(a!, b!, s),
    },
  ]
}
