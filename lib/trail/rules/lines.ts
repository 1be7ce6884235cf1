import { minuteText } from '@/lib/report/rules'
import { dayIn, spokenDay } from '@/lib/study/rules/calendar'
import { capital } from '@/lib/study/rules/words'
import type { TrailEntry } from '../queries'
import { aboutRow, changesOf, type Change } from './changes'
import { actWord, thingWord } from './words'

/** One entry as it is read: words only, so that a case's whole frozen content does not travel with its page. */
export type TrailLine = {
  id: number
  at: string
  actorId: string
  who: string
  when: string
  day: string
  isShifted: boolean
  thing: string
  name: string | null
  href: string | null
  act: string
  isUpdate: boolean
  /** Something done without a row, such as signing in. */
  isEvent: boolean
  changes: Change[]
  reason: string | null
}

export function trailLines(
  entries: readonly TrailEntry[],
  zone: string,
  people: ReadonlyMap<string, string>,
): TrailLine[] {
  return entries.map((entry) => ({
    id: entry.id,
    at: entry.at,
    actorId: entry.actorId,
    who: entry.actorName,
    when: minuteText(entry.at, zone),
    day: spokenDay(dayIn(zone, entry.at)),
    isShifted: entry.isShifted,
    thing: capital(thingWord(entry.tableName)),
    ...aboutRow(entry, people),
    act: actWord(entry),
    isUpdate: entry.operation === 'update',
    isEvent: entry.operation === 'event',
    changes: changesOf(entry, zone, people),
    reason: entry.reason,
  }))
}
