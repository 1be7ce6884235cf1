import { dayIn } from '@/lib/study/rules/calendar'

/** Who would change it. */
export type Person = { id: string; isFormulator: boolean }
export type Logged = { byId: string; by: string; recordedAt: string }

/** As with a reading: one's own entry on its day, a formulator any. Null where this person may change it. */
export function whyNotChanged(
  entry: Logged,
  person: Person,
  { now, zone }: { now: string; zone: string },
): string | null {
  if (person.isFormulator) return null
  // What still waits on this device is its author's.
  if (entry.byId !== '' && entry.byId !== person.id)
    return `${entry.by} logged this half. Ask them, or a formulator, to change it.`
  if (dayIn(zone, entry.recordedAt) !== dayIn(zone, now))
    return 'The day of this entry is over. Ask a formulator to change it.'
  return null
}
