import type { Actor } from '@/lib/auth/actor'
import { refuse } from '@/lib/http/errors'
import type { PullJar } from '../queries/pull-jar'
import { undoSeconds } from './undo-seconds'

/** What a void says whose author took a save back at once. */
export const undoneReason = 'undone by its author'
/** What the request may take on its way. */
const graceSeconds = 10

export type SavedReading = {
  id: string
  recordedBy: string
  recordedAt: string
  isVoid: boolean
  supersedesId: string | null
  newer: { isVoid: boolean; reason: string | null; by: string } | null
}

export function isUndone(reading: SavedReading): boolean {
  return reading.newer !== null && reading.newer.isVoid && reading.newer.reason === undoneReason
}

/** Only its author takes a save back, only at once, and only as a whole. */
export function refuseUndo(actor: Actor, jar: PullJar, saved: readonly SavedReading[]): void {
  if (jar.studyState === 'closed')
    throw refuse.conflict(
      `Study ${jar.studyCode} is closed, so the readings of ${jar.code} stay as they are.`,
    )
  if (saved.some((reading) => reading.recordedBy !== actor.personId))
    throw refuse.forbidden(
      `Someone else kept these readings of ${jar.code}. Ask them to correct or void them.`,
    )
  const age = Math.max(...saved.map((one) => Date.parse(jar.now) - Date.parse(one.recordedAt)))
  if (age > (undoSeconds + graceSeconds) * 1000)
    throw refuse.conflict(
      `The ${undoSeconds} seconds in which ${jar.code} could be undone are over. Correct or void its readings instead.`,
    )
  const changed = saved.find((reading) => reading.newer !== null)
  if (changed)
    throw refuse.conflict(
      `${changed.newer!.by} has changed a reading of ${jar.code} since it was kept: "${changed.newer!.reason}". Correct or void the others instead.`,
    )
  if (saved.some((reading) => reading.supersedesId !== null))
    throw refuse.conflict(
      `With this save you said which of two readings of ${jar.code} counts. Correct it instead.`,
    )
}

/** The jar's note without what a save added to it; what others noted since stays. */
export function noteWithout(now: string, { before, after }: { before: string; after: string }): string {
  if (now === after) return before
  const stood = before.split('\n')
  const added = after.split('\n').filter((line) => !stood.includes(line))
  return now
    .split('\n')
    .filter((line) => !added.includes(line))
    .join('\n')
}
