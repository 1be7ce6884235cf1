import type { Actor } from '@/lib/auth/actor'
import { refuse } from '@/lib/http/errors'
import { dayIn } from '@/lib/study/rules/calendar'
import type { ReadingRow } from '../queries/one'

/** A technician mends an own entry while it is fresh, on the lab's day it was made; a formulator any. */
export function refuseChange(actor: Actor, reading: ReadingRow): void {
  if (reading.studyState === 'closed') {
    throw refuse.conflict(`Study ${reading.studyCode} is closed, so its readings stay as they are.`)
  }
  if (reading.newerId) {
    const what = reading.isNewerVoid ? 'voided' : 'corrected'
    throw refuse.stale(
      `${reading.changerName} has ${what} this reading since you opened it: "${reading.newerReason}". Look at what stands now.`,
      { currentId: reading.newerId, changedBy: reading.changerName, reason: reading.newerReason },
    )
  }
  if (reading.isVoid) throw refuse.conflict('This entry is a void and stays one. Enter the jar anew.')
  if (actor.roles.includes('formulator')) return
  if (reading.recordedBy !== actor.personId) {
    throw refuse.forbidden(`${reading.authorName} made this entry. Ask them, or a formulator, to change it.`)
  }
  if (dayIn(reading.zone, reading.recordedAt) !== dayIn(reading.zone, reading.now)) {
    throw refuse.forbidden('The day of this entry is over. Ask a formulator to change it.')
  }
}
